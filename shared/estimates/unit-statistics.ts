import { independentInterval, statisticsOf, type Interval, type Statistics } from '#shared/geostatistics/statistics.ts'
import type { PreparedValues } from './prepared-values.ts'
import type { Evidence, UnitModel } from './types.ts'

/** Statistics of one unit and quantity, log10, over the values that the data rules let in. */
export interface UnitStatistics extends Omit<Statistics, 'outliers'> {
  sites: number
  /** 95 % interval of the mean where only sites that stand apart count as independent; null for fewer than two. */
  meanBySites: Interval | null
  evidence: Record<Evidence, number>
  /** Values whose robust z exceeds 3.5, to be looked at again. */
  outlierIds: string[]
}

/** null when no value may be used. */
export function unitStatistics(values: PreparedValues, model: UnitModel | null): UnitStatistics | null {
  const { used } = values
  if (used.length === 0) return null
  const data = {
    x: used.map((v) => v.x),
    y: used.map((v) => v.y),
    z: used.map((v) => v.log10),
    errorVariance: used.map((v) => v.error ** 2),
  }
  const { outliers, ...statistics } = statisticsOf(data, model?.variogram ?? null)
  const count = (evidence: Evidence): number => used.filter((v) => v.evidence === evidence).length
  const sites = values.sites().length
  return {
    ...statistics,
    sites,
    meanBySites: independentInterval(statistics.mean, statistics.deviation, sites),
    evidence: { firm: count('firm'), fair: count('fair'), slight: count('slight') },
    outlierIds: outliers.map((i) => used[i]!.id),
  }
}
