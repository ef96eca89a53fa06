import type { AdoptedStatistics } from '#shared/contracts/adopted-values.ts'
import { deviationOf, meanOf, quantileOf, rising } from '#shared/geostatistics/robust.ts'

export interface Logarithm {
  quantity: AdoptedStatistics['quantity']
  storageClass: AdoptedStatistics['storageClass']
  log10: number
}

/** Statistics of each quantity and storage class: classes are never pooled. Values back in SI, the deviation in log10. */
export function statisticsOf(values: Logarithm[]): AdoptedStatistics[] {
  const groups = new Map<string, Logarithm[]>()
  for (const value of values) {
    const key = `${value.quantity} ${value.storageClass ?? ''}`
    groups.set(key, groups.get(key) ?? [])
    groups.get(key)!.push(value)
  }
  return [...groups.values()].map(summarise).sort((a, b) => rank(a) - rank(b))
}

const order = ['T', 'S elastic', 'S specific-yield', 'S apparent', 'S unclassified', 'K']
const rank = ({ quantity, storageClass }: AdoptedStatistics) =>
  order.indexOf([quantity, storageClass].filter(Boolean).join(' '))

function summarise(group: Logarithm[]): AdoptedStatistics {
  const logs = rising(group.map(({ log10 }) => log10))
  const { quantity, storageClass } = group[0]!
  return {
    quantity,
    storageClass,
    n: logs.length,
    geometricMean: 10 ** meanOf(logs),
    log10Sd: logs.length > 1 ? deviationOf(logs) : null,
    p10: 10 ** quantileOf(logs, 0.1),
    p50: 10 ** quantileOf(logs, 0.5),
    p90: 10 ** quantileOf(logs, 0.9),
  }
}
