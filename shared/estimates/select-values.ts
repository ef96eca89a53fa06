import { exclusionOf } from './data-rules.ts'
import type { Exclusion, Quantity, SiteValue, UsedValue } from './types.ts'

export interface Selection {
  used: UsedValue[]
  excluded: Exclusion[]
}

function groupBy<V>(values: readonly V[], key: (value: V) => string): V[][] {
  const groups = new Map<string, V[]>()
  for (const value of values) {
    const group = groups.get(key(value))
    if (group) group.push(value)
    else groups.set(key(value), [value])
  }
  return [...groups.values()]
}

/** The best-grounded member lends a pooled value its name, place and evidence. */
const best = <V extends SiteValue>(group: readonly V[]): V =>
  group.reduce((kept, next) => (next.error < kept.error ? next : kept))

function weightedMean(group: readonly SiteValue[]): { mean: number; weight: number } {
  const weight = group.reduce((sum, v) => sum + v.error ** -2, 0)
  return { mean: group.reduce((sum, v) => sum + v.log10 * v.error ** -2, 0) / weight, weight }
}

/** Values of one test share its rate and its aquifer, so that their mean is no surer than the best of them. */
function poolTest(group: SiteValue[]): UsedValue {
  const chosen = best(group)
  const log10 = group.length === 1 ? chosen.log10 : weightedMean(group).mean
  return { ...chosen, log10, memberIds: group.map((v) => v.id), testIds: [chosen.testId] }
}

/** Repeated tests at a well are independent measurements of one value; where they differ more than their errors say, the scatter counts. */
function poolWell(group: UsedValue[]): UsedValue {
  const chosen = best(group)
  if (group.length === 1) return chosen
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
  const tests = groupBy(kept, (v) => v.testId).map(poolTest)
  return { used: groupBy(tests, (v) => v.wellId).map(poolWell), excluded }
}
