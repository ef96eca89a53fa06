import { computed, ref, type Ref } from 'vue'
import { comparedCurve, comparisonPlot, type ComparedCurve } from '#shared/charts/comparison-chart.ts'
import { plotKinds, type PlotKind } from '#shared/charts/plot-kinds.ts'
import type { TimePlot, TimePlotRequest } from '#shared/charts/time-plot.ts'
import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import { useUnits } from '../../composables/useUnits.ts'
import { usePreferences } from '../../stores/preferences.ts'
import type { Compared } from './use-compared.ts'
import { useWorkbench } from './use-workbench.ts'

type TimeKind = TimePlotRequest['kind']
const isTimeKind = (kind: PlotKind): kind is TimeKind => kind !== 'distance' && kind !== 'composite'

/** The readings with the curves of some analyses over them. */
export function useComparisonPlot(chosen: Ref<readonly Compared[]>) {
  const { snapshot } = useWorkbench()
  const units = useUnits()
  const preferences = usePreferences()
  const kind = ref<TimeKind>('semi-log')

  const kinds = computed(() =>
    plotKinds
      .filter(({ fits }) => fits(snapshot.value.inputs))
      .flatMap(({ id, label }) => (isTimeKind(id) ? [{ value: id, title: label }] : [])),
  )
  const wellIds = computed(() => {
    const used = new Set(chosen.value.flatMap(({ options }) => options.wellIds))
    const all = snapshot.value.inputs.series.map(({ wellId }) => wellId)
    return used.size > 0 ? all.filter((id) => used.has(id)) : all
  })
  const plot = computed<TimePlot>(() =>
    comparisonPlot({
      kind: kinds.value.some(({ value }) => value === kind.value) ? kind.value : 'semi-log',
      inputs: snapshot.value.inputs,
      wellIds: wellIds.value,
      options: { phase: 'all' },
      units: { time: units.id('time'), length: units.id('length') },
      direction: preferences.drawdownDirection,
    }),
  )
  const curves = computed(() => chosen.value.map((item) => curveOf(plot.value, item, snapshot.value.inputs)))

  return { kind, kinds, plot, curves }
}

/** A kept analysis of inputs that have changed since may have no curve on the present ones; its numbers stand. */
function curveOf(
  plot: TimePlot,
  { label, options, result }: Compared,
  inputs: Parameters<typeof comparedCurve>[2]['inputs'],
): ComparedCurve {
  try {
    return comparedCurve(plot, label, { inputs, options, result })
  } catch (error) {
    if (error instanceof AnalysisError || error instanceof RangeError) return { label, wells: [] }
    throw error
  }
}
