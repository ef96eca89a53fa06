import { computed, ref, type ComputedRef, type Ref } from 'vue'
import { firstKindPlot, kindPlot, kindPlots, type KindPlotId } from '#shared/charts/kind-plot.ts'
import type { SimplePlot } from '#shared/charts/simple-plot.ts'
import { useUnits } from '../../composables/useUnits.ts'
import { usePreferences } from '../../stores/preferences.ts'
import { useKindBench } from './use-kind-bench.ts'

/** The plot of the open analysis in the reader's units. */
export function useKindPlot(): {
  plot: ComputedRef<SimplePlot>
  kind: Ref<KindPlotId>
  kinds: ComputedRef<{ value: KindPlotId; title: string }[]>
} {
  const { snapshot, present, result } = useKindBench()
  const units = useUnits()
  const preferences = usePreferences()
  const kinds = computed(() => kindPlots[snapshot.value.kind].map(({ id, title }) => ({ value: id, title })))
  const wanted = ref<KindPlotId | null>(null)

  const kind = computed<KindPlotId>({
    get: () => wanted.value ?? firstKindPlot(snapshot.value.kind, present.value?.method ?? null),
    set: (value) => (wanted.value = value),
  })

  const plot = computed<SimplePlot>(() =>
    kindPlot(snapshot.value.kind, kind.value, {
      inputs: snapshot.value.inputs,
      fit: present.value && {
        method: present.value.method,
        options: present.value.options,
        result: result.value ?? null,
      },
      units: {
        time: units.id('time'),
        length: units.id('length'),
        discharge: units.id('discharge'),
        transmissivity: units.id('transmissivity'),
      },
      direction: preferences.drawdownDirection,
    }),
  )

  return { plot, kind, kinds }
}
