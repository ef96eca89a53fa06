import { computed, ref, type ComputedRef, type Ref } from 'vue'
import { capacityPlot } from '#shared/charts/capacity-plot.ts'
import { slugPlot } from '#shared/charts/slug-plot.ts'
import type { SimplePlot } from '#shared/charts/simple-plot.ts'
import { perRatePlot, stepTimePlot } from '#shared/charts/step-plot.ts'
import { curveOwn, type OwnKindId } from '#shared/hydraulics/any-kind.ts'
import type { SlugOptions } from '#shared/hydraulics/slug/slug-test.ts'
import type { SpecificCapacityOptions } from '#shared/hydraulics/specific-capacity/specific-capacity-test.ts'
import { useUnits } from '../../composables/useUnits.ts'
import { usePreferences } from '../../stores/preferences.ts'
import { useHeadRange } from '../slug-tests/use-head-range.ts'
import { useKindBench } from './use-kind-bench.ts'

export type KindPlotId = 'head-log' | 'head-linear' | 'per-rate' | 'step-time' | 'storage'

/** The plots of each kind, the telling one first. */
const kindPlots: Record<OwnKindId, readonly { value: KindPlotId; title: string }[]> = {
  slug: [
    { value: 'head-log', title: 'Logarithmic' },
    { value: 'head-linear', title: 'Linear' },
  ],
  step: [
    { value: 'per-rate', title: 's/Q and Q' },
    { value: 'step-time', title: 'Time' },
  ],
  'specific-capacity': [{ value: 'storage', title: 'Storativity' }],
}

/** Levels that swing have no logarithm. */
const swinging = new Set(['slug-oscillating', 'slug-near-critical'])

/** The plot of the open analysis in the reader's units. */
export function useKindPlot(): {
  plot: ComputedRef<SimplePlot>
  kind: Ref<KindPlotId>
  kinds: ComputedRef<(typeof kindPlots)[OwnKindId]>
} {
  const { snapshot, present, result } = useKindBench()
  const units = useUnits()
  const preferences = usePreferences()
  const kinds = computed(() => kindPlots[snapshot.value.kind])
  const wanted = ref<KindPlotId | null>(null)

  const kind = computed<KindPlotId>({
    get: () => {
      if (wanted.value) return wanted.value
      return present.value && swinging.has(present.value.method) ? 'head-linear' : kinds.value[0]!.value
    },
    set: (value) => (wanted.value = value),
  })

  function curve(times_s: number[]) {
    const { value: work } = present
    if (!work || !result.value) return []
    const { kind: ofTest, inputs } = snapshot.value
    return curveOwn(ofTest, { method: work.method, inputs, options: work.options, result: result.value }, times_s)
  }

  const { heads } = useHeadRange()

  const plot = computed<SimplePlot>(() => {
    const given = snapshot.value
    const unitIds = { time: units.id('time'), length: units.id('length'), discharge: units.id('discharge') }
    if (given.kind === 'slug') {
      return slugPlot({
        kind: kind.value === 'head-linear' ? 'head-linear' : 'head-log',
        inputs: given.inputs,
        repeatIds: (present.value?.options as SlugOptions | undefined)?.repeatIds ?? null,
        heads: heads.value,
        outcome: result.value,
        curve,
        // A slug test lasts seconds to minutes, in whatever unit pumping tests are read.
        timeUnit: 's',
      })
    }
    if (given.kind === 'step') {
      if (kind.value === 'per-rate') return perRatePlot(result.value, unitIds)
      const { drawdownDirection: direction } = preferences
      return stepTimePlot({ inputs: given.inputs, curve, units: unitIds, direction })
    }
    return capacityPlot({
      inputs: given.inputs,
      options: (present.value?.options ?? {}) as SpecificCapacityOptions,
      T: result.value?.T?.value ?? null,
      unit: units.id('transmissivity'),
    })
  })

  return { plot, kind, kinds }
}
