import { computed } from 'vue'
import { headsOf } from '#shared/charts/kind-plot.ts'
import type { SlugOptions } from '#shared/hydraulics/slug/slug-test.ts'
import { useKindBench } from '../kind-tests/use-kind-bench.ts'

/** Heads as shares of the first displacement. */
export interface HeadRange {
  from: number
  to: number
}

/** Between which heads the line is drawn: those of the method until somebody says others; null where there is no line. */
export function useHeadRange() {
  const { present, setOptions } = useKindBench()

  const given = computed(() => (present.value?.options as SlugOptions | undefined)?.heads ?? null)
  const heads = computed<HeadRange | null>(() => headsOf(present.value))
  const setHeads = (range: HeadRange | null) => setOptions({ heads: range })

  return { heads, given, setHeads }
}
