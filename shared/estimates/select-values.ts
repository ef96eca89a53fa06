import { exclusionOf } from './data-rules.ts'
import type { Exclusion, Quantity, SiteValue, UsedValue } from './types.ts'

export interface Selection {
  used: UsedValue[]
  excluded: Exclusion[]
}

/** Pools the values that share a key, in order of appearance; most are alone, so that only companions get a list. */
function poolBy<V, U>(values: readonly V[], key: (v: V) => string, alone: (v: V) => U, pool: (group: V[]) => U): U[] {
  const firsts = new Map<string, V>()
  const groups = new Map<string, V[]>()
  for (const value of values) {
    const first = firsts.get(key(value))
    if (first === undefined) firsts.set(key(value), value)
    else groups.set(key(value), [...(groups.get(key(value)) ?? [first]), value])
  }
  const pooled: U[] = []
  firsts.forEach((value, k) => {
    const group = groups.get(k)
    pooled.push(group ? pool(group) : alone(value))
  })
  return pooled
}

/** The best-grounded member lends a pooled value its name, place and evidence. */
const best = <V extends SiteValue>(group: readonly V[]): V =>
  group.reduce((kept, next) => (next.error < kept.error ? next : kept))

function weightedMean(group: readonly SiteValue[]): { mean: number; weight: number } {
  const weight = group.reduce((sum, v) => sum + v.error ** -2, 0)
  return { mean: group.reduce((sum, v) => sum + v.log10 * v.error ** -2, 0) / weight, weight }
}

/** The lists come first: V8 copies a whole object into a fresh one thirty times as fast as it adds to a copied one. */
const single = (value: SiteValue): UsedValue => ({ memberIds: [value.id], testIds: [value.testId], ...value })

/** Values of one test share its rate and its aquifer, so that their mean is no surer than the best of them. */
function poolTest(group: SiteValue[]): UsedValue {
  return { ...single(best(group)), log10: weightedMean(group).mean, memberIds: group.map((v) => v.id) }
}

/** Repeated tests at a well are independent measurements of one value; where they differ more than their errors say, the scatter counts. */
function poolWell(group: UsedValue[]): UsedValue {
  const chosen = best(group)
  const { mean, weight } = weightedMean(group)
  const scatter = group.reduce((sum, v) => sum + v.error ** -2 * (v.log10 - mean) ** 2, 0) / weight / (group.length - 1)
  return {
    ...chosen,
    log10: mean,
    error: Math.sqrt(Math.max(1 / weight, scatter)),
    memberIds: group.flatMap((v) => v.memberIds),
    testIds: group.map((v) => v.testId),
  }
}

/** Applies the data rules: leaves out what may not be believed, then keeps one value per test and one per well. */
export function selectValues(values: readonly SiteValue[], quantity: Quantity): Selection {
  const excluded: Exclusion[] = []
  const kept = values.filter((value) => {
    const reason = exclusionOf(value, quantity)
    if (reason) excluded.push({ id: value.id, reason })
    return reason === null
  })
  const tests = poolBy(kept, (v) => v.testId, single, poolTest)
  return { used: poolBy(tests, (v) => v.wellId, (v) => v, poolWell), excluded } // prettier-ignore
}
