import { computed, type ComputedRef, type Ref } from 'vue'
import type { Fit } from '#shared/charts/fit-band.ts'
import { compositeDrawing, compositePlot } from '#shared/charts/composite-plot.ts'
import { distanceDrawing, distancePlot } from '#shared/charts/distance-plot.ts'
import { fitDrawing, type FitDrawing } from '#shared/charts/fit-drawing.ts'
import { timePlot } from '#shared/charts/time-plot.ts'
import { drawsLine, plotKinds } from '#shared/charts/plot-kinds.ts'
import type { TestPlot } from '#shared/charts/test-chart.ts'
import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import { useUnits } from '../../composables/useUnits.ts'
import { usePreferences } from '../../stores/preferences.ts'
import { useWorkbench } from './use-workbench.ts'

/** A computed value that stays the same object while it says the same. */
const sameText = <Value>(make: () => Value) => {
  const text = computed(() => JSON.stringify(make()))
  return computed(() => JSON.parse(text.value) as Value)
}

interface PlotSettings {
  smoothing: Ref<number>
  /** Moment at which a distance plot compares wells, elapsed seconds; null: the last common one. */
  moment: Ref<number | null>
  /** Well whose derivative is diagnosed. */
  diagnosed: Ref<string | null>
  /** Ends of the part of the time axis that is looked at; null: all of it. */
  view: Ref<[number, number] | null>
}

/** The plot that stands, and the drawing that follows the mouse. The plot is made anew only when what it shows changes. */
export function useTestPlot({ smoothing, moment, diagnosed, view }: PlotSettings) {
  const { snapshot, present, result, calculated, moving, plotKind } = useWorkbench()
  const units = useUnits()
  const preferences = usePreferences()

  /** What a test had when a plot was chosen may be gone since: the stop for a recovery, wells for a distance plot. */
  const shownKind = computed(() => {
    const fits = plotKinds.find(({ id }) => id === plotKind.value)?.fits(snapshot.value.inputs) ?? false
    return fits ? plotKind.value : 'semi-log'
  })

  /** The wells of the analysis; all of them without one, or where wells are compared by an analysis of a single one. */
  const wellIds = sameText(() => {
    const all = snapshot.value.inputs.series.map(({ wellId }) => wellId)
    const compares = present.value && drawsLine(present.value.method, 'distance')
    const comparesAll = shownKind.value === 'composite' || (shownKind.value === 'distance' && !compares)
    return comparesAll ? all : (present.value?.options.wellIds ?? all)
  })
  const history = sameText(() => ({
    phase: present.value?.options.phase ?? 'pumping',
    rateHistory: present.value?.options.rateHistory ?? 'superposition',
  }))
  const unitIds = computed(() => ({ time: units.id('time'), length: units.id('length') }))

  const plot: ComputedRef<TestPlot> = computed(() => {
    const { inputs } = snapshot.value
    const common = { inputs, wellIds: wellIds.value, units: unitIds.value, direction: preferences.drawdownDirection }
    const kind = shownKind.value
    if (kind === 'distance') return distancePlot({ ...common, time_s: moment.value })
    const options = history.value
    if (kind === 'composite') return compositePlot({ ...common, options })
    const looked = { smoothing: smoothing.value, diagnosed: diagnosed.value, view: view.value }
    return timePlot({ ...common, kind, options, ...looked })
  })

  const fit = computed<Fit | null>(() =>
    calculated.value && result.value
      ? { inputs: snapshot.value.inputs, options: calculated.value.options, result: result.value }
      : null,
  )

  const drawing = computed<FitDrawing | null>(() => {
    if (!fit.value) return null
    try {
      if (plot.value.kind === 'distance') return distanceDrawing(plot.value, fit.value)
      if (plot.value.kind === 'composite') return compositeDrawing(plot.value, fit.value)
      return fitDrawing(plot.value, fit.value, { withBand: !moving.value })
    } catch (error) {
      // A kept analysis of inputs that have changed since may have no curve on the present ones; its numbers stand.
      if (error instanceof AnalysisError || error instanceof RangeError) return null
      throw error
    }
  })

  /** What is not drawn is not listed either. */
  const drawn = computed(() => (drawing.value ? fit.value : null))

  return { plot, fit: drawn, drawing }
}
