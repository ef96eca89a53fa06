import { z } from 'zod'
import { kindOfMethod, ownKindIds, type AnyInputs, type AnyOptions, type OwnKindId } from '../hydraulics/any-kind.ts'
import { methodIdsOf, ownKinds } from '../hydraulics/kinds.ts'
import { shapeFactorIds } from '../hydraulics/slug/shape-factors.ts'
import { analysisInputs, analysisOptions, rateStep, series } from './analysis-result.ts'

/** What tests of a kind of their own are analysed from, and with which options. Stored with `version: 1`. */

const aquifer = z.enum(['confined', 'leaky', 'unconfined'])

const repeat = z.object({
  id: z.string(),
  label: z.string(),
  initial_m: z.number(),
  elapsed_s: z.array(z.number()),
  displacement_m: z.array(z.number()),
  included: z.array(z.boolean()),
})

export const slugInputs = z.object({
  version: z.literal(1),
  wellId: z.string(),
  label: z.string(),
  repeats: z.array(repeat),
  casingRadius_m: z.number(),
  wellRadius_m: z.number(),
  screenRadius_m: z.number(),
  screenLength_m: z.number(),
  screenTop_m: z.number(),
  thickness_m: z.number().nullable(),
  thicknessError: z.number(),
  filterPack: z.object({ radius_m: z.number(), porosity: z.number() }).nullable(),
  radiusError: z.number(),
  anisotropy: z.number(),
  aquifer,
  storage: z.object({ value: z.number(), logSd: z.number() }),
})

export const slugOptions = z.strictObject({
  repeatIds: z.array(z.string()).max(60).nullable(),
  heads: z.object({ from: z.number(), to: z.number() }).nullable().optional(),
  line: z.object({ slope: z.number(), intercept: z.number() }).nullable().optional(),
  shape: z.enum(shapeFactorIds as [(typeof shapeFactorIds)[number]]).optional(),
  readingsPerCycle: z.int().positive().nullable().optional(),
})

export const stepInputs = z.object({
  version: z.literal(1),
  rates: z.array(rateStep),
  rateError: z.number(),
  well: series,
})

export const stepOptions = z.strictObject({
  increment_s: z.number().positive().nullable().optional(),
  trendFrom: z.number().min(0).max(0.9).optional(),
  predictedRate_m3_s: z.number().positive().max(100).nullable().optional(),
})

export const specificCapacityInputs = z.object({
  version: z.literal(1),
  wellId: z.string(),
  label: z.string(),
  rate_m3_s: z.number(),
  rateError: z.number(),
  drawdown_m: z.number(),
  drawdownSd_m: z.number(),
  duration_s: z.number(),
  wellRadius_m: z.number(),
  casingRadius_m: z.number().nullable(),
  aquifer,
  thickness_m: z.number().nullable(),
  thicknessError: z.number(),
  screenLength_m: z.number().nullable(),
})

export const specificCapacityOptions = z.strictObject({
  storativity: z.number().positive().max(0.5).nullable().optional(),
  storativityLogSd: z.number().min(0).max(3).nullable().optional(),
  wellLoss_s2_m5: z.number().min(0).max(1e7).optional(),
  wellLossSd_s2_m5: z.number().min(0).max(1e7).optional(),
  thinning: z.boolean().optional(),
})

/** Schemas of each kind by its id. */
export const kindSchemas = {
  slug: { inputs: slugInputs, options: slugOptions },
  step: { inputs: stepInputs, options: stepOptions },
  'specific-capacity': { inputs: specificCapacityInputs, options: specificCapacityOptions },
} as const satisfies Record<OwnKindId, { inputs: z.ZodType; options: z.ZodType }>

const idsOf = <Id extends OwnKindId>(kind: Id) =>
  z.enum(methodIdsOf(kind) as [keyof (typeof ownKinds)[Id]['methods'] & string])

/** Registering a method with its kind is all that is needed for it to be accepted here. */
export const kindMethodIds = {
  slug: idsOf('slug'),
  step: idsOf('step'),
  'specific-capacity': idsOf('specific-capacity'),
}
export const ownMethod = z.enum(ownKindIds.flatMap(methodIdsOf) as [string])
export const ownKind = z.enum(ownKindIds as [OwnKindId])

/** Options of an analysis of any kind; those of the kinds are strict, so that each is recognised by what it holds. */
export const anyOptions = z.union([analysisOptions, slugOptions, stepOptions, specificCapacityOptions])

/** A stored snapshot, by the method that was used on it. @throws ZodError */
export function parseInputs(method: string, stored: unknown): AnyInputs {
  const kind = kindOfMethod(method)
  return kind === 'constant-rate' ? analysisInputs.parse(stored) : kindSchemas[kind].inputs.parse(stored)
}

/** Stored options, by their method. @throws ZodError */
export function parseOptions(method: string, stored: unknown): AnyOptions {
  const kind = kindOfMethod(method)
  return kind === 'constant-rate' ? analysisOptions.parse(stored) : kindSchemas[kind].options.parse(stored)
}
