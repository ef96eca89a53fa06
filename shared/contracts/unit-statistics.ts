import { z } from 'zod'
import { METHOD_GROUPS } from '../estimates/method-group-ids.ts'
import { recordId } from './common.ts'
import { estimateQuantity, unitAtPlace } from './estimates.ts'
import { evidence } from './kinds.ts'

const methodGroup = z.enum(METHOD_GROUPS)

export const unitStatisticsQuery = z.object({
  quantity: estimateQuantity.default('T'),
  /** Left out: values of any evidence. */
  evidence: evidence.optional(),
})
export type UnitStatisticsQuery = z.infer<typeof unitStatisticsQuery>

/** All of log10 of SI values. */
const interval = z.object({ low: z.number(), high: z.number() })
const summary = z.object({
  n: z.int(),
  mean: z.number(),
  median: z.number(),
  deviation: z.number(),
  p10: z.number(),
  p90: z.number(),
})

const figures = summary.extend({
  sites: z.int(),
  least: z.number(),
  most: z.number(),
  declustered: summary.extend({ cellSize: z.number() }),
  meanIfIndependent: interval.nullable(),
  meanBySites: interval.nullable(),
  meanByKriging: interval.extend({ mean: z.number(), effectiveN: z.number() }).nullable(),
  evidence: z.object({ firm: z.int(), fair: z.int(), slight: z.int() }),
})

const overviewValue = z.object({
  valueId: recordId,
  wellId: recordId,
  wellCode: z.string(),
  log10: z.number(),
  evidence,
  group: methodGroup,
  year: z.int().nullable(),
  depthM: z.number().nullable(),
  robustZ: z.number(),
  normalScore: z.number(),
  /** How many tests of the well it was pooled from. */
  tests: z.int(),
})
export type OverviewValue = z.infer<typeof overviewValue>

const trend = z.object({
  n: z.int(),
  slope: z.number(),
  slopeLow: z.number(),
  slopeHigh: z.number(),
  intercept: z.number(),
  scatter: z.number(),
  explained: z.number(),
})
export type Trend = z.infer<typeof trend>

const capacityPair = z.object({
  wellId: recordId,
  wellCode: z.string(),
  /** Specific capacity after a day. */
  log10Capacity: z.number(),
  log10T: z.number(),
})

export const unitStatistics = z.object({
  unit: unitAtPlace,
  quantity: estimateQuantity,
  figures: figures.nullable(),
  values: z.array(overviewValue),
  /** Ids of values whose robust z exceeds 3.5. */
  outlierIds: z.array(recordId),
  methods: z.array(
    z.object({
      group: methodGroup,
      n: z.int(),
      mean: z.number(),
      fromCurves: interval.extend({ difference: z.number() }).nullable(),
    }),
  ),
  /** On depth in metres. */
  depth: trend.nullable(),
  year: trend.nullable(),
  excluded: z.int(),
  capacity: z.object({ pairs: z.array(capacityPair), regression: trend.nullable() }).nullable(),
  variogram: z.object({ model: z.string(), nugget: z.number(), sill: z.number(), range: z.number() }).nullable(),
  modelOutdated: z.boolean(),
})
export type UnitStatistics = z.infer<typeof unitStatistics>
export type UnitFigures = NonNullable<UnitStatistics['figures']>
