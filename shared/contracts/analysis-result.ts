import { z } from 'zod'
import { correctionKindIds, type CorrectionKind } from '../hydraulics/corrections/kinds.ts'
import { storageClass } from './kinds.ts'

/** Stored analyses carry `version: 1`; a later shape brings its own literal and one upgrade from this one. */

export const parameterEstimate = z.object({
  value: z.number(),
  low: z.number(),
  high: z.number(),
  logSd: z.number(),
  determined: z.boolean(),
})

export const otherEstimate = z.object({
  id: z.string(),
  value: z.number(),
  low: z.number(),
  high: z.number(),
  determined: z.boolean(),
})

export const finding = z.object({
  code: z.string(),
  severity: z.enum(['good', 'note', 'caution', 'bad']),
  params: z.record(z.string(), z.union([z.string(), z.number()])),
})

export { storageClass }

const leftOutReason = z.enum([
  'excluded',
  'not-finite',
  'outside-phase',
  'outside-window',
  'not-positive',
  'thinned',
  'pumped-well',
  'not-measured',
])

export const analysisResult = z.object({
  version: z.literal(1),
  method: z.string(),
  methodVersion: z.int(),
  T: parameterEstimate.nullable(),
  S: parameterEstimate.nullable(),
  K: parameterEstimate.nullable(),
  storageClass: storageClass.nullable(),
  others: z.array(otherEstimate).optional(),
  extras: z.record(z.string(), z.number()),
  residuals: z.array(
    z.object({
      wellId: z.string(),
      elapsed_s: z.number(),
      residual_m: z.number(),
      standsFor: z.int().positive().optional(),
    }),
  ),
  /** Wells whose residuals were thinned to be kept; results without any, and older ones, leave it out. */
  residualsShown: z.array(z.object({ wellId: z.string(), residualsShown: z.int(), of: z.int() })).optional(),
  fit: z.object({
    n: z.int(),
    effectiveN: z.number(),
    rmse_m: z.number(),
    autocorrelation: z.number(),
    iterations: z.int(),
    converged: z.boolean(),
    singular: z.boolean(),
    objective: z.number(),
    correlation: z.number().optional(),
    weighedLess: z.int().optional(),
    aicc: z.number().nullable().optional(),
  }),
  findings: z.array(finding),
  leftOut: z.array(z.object({ wellId: z.string(), count: z.int(), reason: leftOutReason })),
})
export type StoredResult = z.infer<typeof analysisResult>

export const rateStep = z.object({ start_s: z.number(), rate_m3_s: z.number() })

/** Depths below the aquifer's top. */
const interval = z.object({ top_m: z.number(), bottom_m: z.number() })
const construction = {
  wellRadius_m: z.number().nullable(),
  casingRadius_m: z.number().nullable(),
  screen: interval.nullable().optional(),
}

/** What was taken off the readings of a well, frozen with them. */
const appliedCorrection = z.object({
  kind: z.enum(correctionKindIds as [CorrectionKind]),
  given: z.boolean(),
  outside: z.string().nullable(),
  record: z.record(z.string(), z.number()),
  findings: z.array(finding),
})

const otherPumpingWell = z.object({
  wellId: z.string().nullable(),
  label: z.string(),
  rates: z.array(rateStep),
  fitted: z.boolean(),
  distance_m: z.number(),
  bearing_deg: z.number(),
  distances: z.array(z.object({ wellId: z.string(), distance_m: z.number() })),
})

export const series = z.object({
  wellId: z.string(),
  label: z.string(),
  role: z.enum(['pumped', 'observation']),
  distance_m: z.number(),
  distanceSd_m: z.number(),
  bearing_deg: z.number().nullable().optional(),
  ...construction,
  elapsed_s: z.array(z.number()),
  drawdown_m: z.array(z.number()),
  included: z.array(z.boolean()),
  zero: z.literal('mean-before').optional(),
  corrections: z.array(appliedCorrection).optional(),
})

export const analysisInputs = z.object({
  version: z.literal(1),
  rates: z.array(rateStep),
  rateError: z.number(),
  series: z.array(series),
  pumpedWell: z.object(construction).optional(),
  aquifer: z.enum(['confined', 'leaky', 'unconfined']),
  thickness_m: z.number().nullable(),
  thicknessBasis: z.enum(['aquifer', 'screen', 'saturated', 'unknown']),
  thicknessError: z.number(),
  streamDistance_m: z.number().nullable(),
  otherWells: z.array(otherPumpingWell).optional(),
})

const boundary = z.object({
  kind: z.enum(['recharge', 'barrier']),
  distance_m: z.number().positive().nullable(),
  bearing_deg: z.number(),
})

const window = z.object({ from_s: z.number(), to_s: z.number() })

export const analysisOptions = z.object({
  wellIds: z.array(z.string()).max(60),
  window: window.nullable(),
  line: z.object({ slope: z.number(), intercept: z.number() }).nullable().optional(),
  match: z.record(z.string().max(60), z.number()).nullable().optional(),
  objective: z.enum(['drawdown', 'log-drawdown']).optional(),
  weighting: z.enum(['equal', 'huber']).optional(),
  thinning: z.boolean().optional(),
  afterDrainage: z.boolean().nullable().optional(),
  readingsPerCycle: z.int().positive().nullable().optional(),
  boundaries: z.array(boundary).max(2).optional(),
  phase: z.enum(['pumping', 'all']).optional(),
  time_s: z.number().positive().nullable().optional(),
  rateHistory: z.enum(['superposition', 'equivalent']).optional(),
})
