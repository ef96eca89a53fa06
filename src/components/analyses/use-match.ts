import { computed } from 'vue'
import type { OptionSpec } from '#shared/hydraulics/method.ts'
import { methods } from '#shared/hydraulics/catalogue.ts'
import { shiftedMatch, type CurveMatch } from '#shared/hydraulics/laid-curve.ts'
import { useWorkbench } from './use-workbench.ts'

const PREFIX = 'fitted_'

/** The curve of the open analysis as it is laid by hand; null where its method has none, or a search finds it. */
export function useMatch() {
  const { present, result, setOptions } = useWorkbench()

  const shift = computed(() => {
    if (!present.value) return null
    const specs: readonly OptionSpec[] = methods[present.value.method].options
    const spec = specs.find(({ kind }) => kind === 'match')
    return spec?.kind === 'match' ? spec.shift : null
  })
  const match = computed(() => (shift.value && present.value?.options.match) ?? null)

  /** What the search has found, to begin with. */
  const found = computed<CurveMatch | null>(() => {
    const values = Object.entries(result.value?.extras ?? {}).filter(([name]) => name.startsWith(PREFIX))
    return shift.value && values.length > 0
      ? Object.fromEntries(values.map(([name, value]) => [name.slice(PREFIX.length), value]))
      : null
  })

  const set = (given: CurveMatch | null) => setOptions({ match: given })
  const begin = () => found.value && set(found.value)

  /** Moves the curve by factors on its times and drawdowns, from where it lay. */
  function move(from: CurveMatch, factors: { time: number; drawdown: number }) {
    if (shift.value) set(shiftedMatch(from, shift.value, factors))
  }

  return { shift, match, found, set, begin, move }
}
