import type { AdoptedStatistics } from '#shared/contracts/adopted-values.ts'

export interface Logarithm {
  quantity: AdoptedStatistics['quantity']
  storageClass: AdoptedStatistics['storageClass']
  log10: number
}

/** Quantile `p` of sorted numbers, linear between order statistics (type 7 of Hyndman & Fan 1996). */
export function quantile(sorted: number[], p: number): number {
  const at = (sorted.length - 1) * p
  const below = Math.floor(at)
  const low = sorted[below]!
  return low + (at - below) * ((sorted[below + 1] ?? low) - low)
}

/** Statistics of each quantity and storage class: classes are never pooled. Values back in SI, the deviation in log10. */
export function statisticsOf(values: Logarithm[]): AdoptedStatistics[] {
  const groups = new Map<string, Logarithm[]>()
  for (const value of values) {
    const key = `${value.quantity} ${value.storageClass ?? ''}`
    groups.set(key, groups.get(key) ?? [])
    groups.get(key)!.push(value)
  }
  return [...groups.values()].map(summarise)
}

function summarise(group: Logarithm[]): AdoptedStatistics {
  const logs = group.map(({ log10 }) => log10).sort((a, b) => a - b)
  const n = logs.length
  const mean = logs.reduce((sum, log10) => sum + log10, 0) / n
  const squares = logs.reduce((sum, log10) => sum + (log10 - mean) ** 2, 0)
  const { quantity, storageClass } = group[0]!
  return {
    quantity,
    storageClass,
    n,
    geometricMean: 10 ** mean,
    log10Sd: n > 1 ? Math.sqrt(squares / (n - 1)) : null,
    p10: 10 ** quantile(logs, 0.1),
    p50: 10 ** quantile(logs, 0.5),
    p90: 10 ** quantile(logs, 0.9),
  }
}
