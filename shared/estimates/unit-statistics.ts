import { statisticsOf, type Statistics } from '#shared/geostatistics/statistics.ts'
import type { PreparedValues } from './prepared-values.ts'
import type { Evidence, UnitModel } from './types.ts'

/** Statistics of one unit and quantity, log10, over the values that the data rules let in. */
export interface UnitStatistics extends Omit<Statistics, 'outliers'> {
  sites: number
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
  return {
    ...statistics,
    sites: values.sites().length,
    evidence: { firm: count('firm'), fair: count('fair'), slight: count('slight') },
    outlierIds: outliers.map((i) => used[i]!.id),
  }
}
