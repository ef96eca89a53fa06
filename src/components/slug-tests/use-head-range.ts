import { computed } from 'vue'
import type { SlugOptions } from '#shared/hydraulics/slug/slug-test.ts'
import { useKindBench } from '../kind-tests/use-kind-bench.ts'

/** Heads as shares of the first displacement. */
export interface HeadRange {
  from: number
  to: number
}

/** Between which heads the line is drawn: those of the method until somebody says others; null where there is no line. */
export function useHeadRange() {
  const { present, method, setOptions } = useKindBench()

  const recommended = computed(() => {
    const spec = method.value?.options.find((option) => option.kind === 'heads')
    return spec?.kind === 'heads' ? spec.default : null
  })
  const given = computed(() => (present.value?.options as SlugOptions | undefined)?.heads ?? null)
  const heads = computed<HeadRange | null>(() => recommended.value && (given.value ?? recommended.value))
  const setHeads = (range: HeadRange | null) => setOptions({ heads: range })

  return { heads, given, setHeads }
}
