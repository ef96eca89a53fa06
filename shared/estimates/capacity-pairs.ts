import { trendOf, type Trend } from '#shared/geostatistics/trend.ts'
import { exclusionOf } from './data-rules.ts'
import { methodGroup } from './method-groups.ts'
import { FEWEST_PAIRS } from './pair-limits.ts'
import type { SiteValue } from './types.ts'

/** One drawdown of a pumped well at one rate and time, SI. */
export interface CapacityTest {
  wellId: string
  rate_m3_s: number
  drawdown_m: number
  duration_s: number
}

export interface CapacityPair {
  wellId: string
  label: string
  /** log10 of Q/s after a day, m²/s, and of T, m²/s. */
  log10Capacity: number
  log10T: number
}

export interface CapacityPairs {
  pairs: CapacityPair[]
  /** log10 T on log10 Q/s; null below 25 pairs. */
  regression: Trend | null
}

const DAY_S = 86_400

/**
 * Specific capacity after a day: drawdown grows by Q/4πT for each factor e of time (Cooper & Jacob 1946), with the well's
 * own T. Null where that leaves no drawdown.
 */
export function capacityAfterADay({ rate_m3_s, drawdown_m, duration_s }: CapacityTest, T: number): number | null {
  const drawdown = drawdown_m + (rate_m3_s / (4 * Math.PI * T)) * Math.log(DAY_S / duration_s)
  return drawdown > 0 && rate_m3_s > 0 ? rate_m3_s / drawdown : null
}

/** T that does not rest on the drawdown of the pumped well itself: only such values may teach what Q/s means. */
const teaches = (value: SiteValue): boolean =>
  exclusionOf(value, 'T') === null && (value.origin === 'observation-well' || methodGroup(value) === 'recovery')

/** One pair for each well that has a specific capacity and such a T, the surest of its values. */
export function capacityPairs(values: readonly SiteValue[], tests: readonly CapacityTest[]): CapacityPairs {
  const surest = new Map<string, SiteValue>()
  for (const value of values.filter(teaches)) {
    const known = surest.get(value.wellId)
    if (!known || value.error < known.error) surest.set(value.wellId, value)
  }
  const latest = new Map(tests.map((test) => [test.wellId, test]))
  const pairs = [...latest.values()].flatMap((test): CapacityPair[] => {
    const value = surest.get(test.wellId)
    const capacity = value ? capacityAfterADay(test, 10 ** value.log10) : null
    if (!value || capacity === null) return []
    return [{ wellId: test.wellId, label: value.label, log10Capacity: Math.log10(capacity), log10T: value.log10 }]
  })
  const line = () => trendOf(pairs.map((pair) => pair.log10Capacity), pairs.map((pair) => pair.log10T)) // prettier-ignore
  return { pairs, regression: pairs.length < FEWEST_PAIRS ? null : line() }
}
