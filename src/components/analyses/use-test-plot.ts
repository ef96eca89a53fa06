import { computed, type ComputedRef, type Ref } from 'vue'
import type { Fit } from '#shared/charts/fit-band.ts'
import { distanceDrawing, distancePlot } from '#shared/charts/distance-plot.ts'
import { fitDrawing, type FitDrawing } from '#shared/charts/fit-drawing.ts'
import { timePlot } from '#shared/charts/time-plot.ts'
import type { TestPlot } from '#shared/charts/test-chart.ts'
import { useUnits } from '../../composables/useUnits.ts'
import { usePreferences } from '../../stores/preferences.ts'
import { useWorkbench } from './use-workbench.ts'

/** A computed value that stays the same object while it says the same. */
const sameText = <Value>(make: () => Value) => {
  const text = computed(() => JSON.stringify(make()))
  return computed(() => JSON.parse(text.value) as Value)
}

/** The plot that stands, and the drawing that follows the mouse. The plot is made anew only when what it shows changes. */
export function useTestPlot(smoothing: Ref<number>) {
  const { snapshot, present, result, moving, plotKind } = useWorkbench()
  const units = useUnits()
  const preferences = usePreferences()

  /** The wells of the analysis; all of them without one, or where wells are compared by an analysis of a single one. */
  const wellIds = sameText(() => {
    const all = snapshot.value.inputs.series.map(({ wellId }) => wellId)
    const compares = present.value?.method === 'distance-drawdown'
    return plotKind.value === 'distance' && !compares ? all : (present.value?.options.wellIds ?? all)
  })
  const history = sameText(() => ({
    phase: present.value?.options.phase ?? 'pumping',
    rateHistory: present.value?.options.rateHistory ?? 'superposition',
  }))
  const moment = computed(() => present.value?.options.time_s ?? null)
  const unitIds = computed(() => ({ time: units.id('time'), length: units.id('length') }))

  const plot: ComputedRef<TestPlot> = computed(() => {
    const { inputs } = snapshot.value
    const common = { inputs, wellIds: wellIds.value, units: unitIds.value, direction: preferences.drawdownDirection }
    const kind = plotKind.value
    return kind === 'distance'
      ? distancePlot({ ...common, time_s: moment.value })
      : timePlot({ ...common, kind, options: history.value, smoothing: smoothing.value })
  })

  const fit = computed<Fit | null>(() =>
    present.value && result.value
      ? { inputs: snapshot.value.inputs, options: present.value.options, result: result.value }
      : null,
  )

  const drawing = computed<FitDrawing | null>(() => {
    if (!fit.value) return null
    if (plot.value.kind === 'distance') return distanceDrawing(plot.value, fit.value)
    return fitDrawing(plot.value, fit.value, { withBand: !moving.value })
  })

  return { plot, fit, drawing }
}
