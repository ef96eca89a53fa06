import { z } from 'zod'
import { methods } from '../hydraulics/catalogue.ts'
import {
  analysisInputs,
  analysisOptions,
  analysisResult,
  finding,
  otherEstimate,
  storageClass,
} from './analysis-result.ts'
import { instant, recordId, rowVersion } from './common.ts'
import { anyOptions, kindMethodIds, kindSchemas, ownMethod } from './kind-analyses.ts'
import { evidence } from './kinds.ts'
import { surrounding } from './surroundings.ts'

/** Registering a method in the hydraulics catalogue is all that is needed for it to be accepted here. */
export const fittedMethod = z.enum(Object.keys(methods) as [keyof typeof methods])
export const analysisMethod = z.union([fittedMethod, ownMethod, z.literal('reported')])
export const analysisState = z.enum(['draft', 'submitted', 'accepted', 'returned', 'withdrawn'])
export { evidence }

/** What the browser calculated; the server refuses to store when its own numbers differ. */
export const expectedResult = z.object({
  methodVersion: z.int(),
  T: z.number().nullable(),
  S: z.number().nullable(),
  /** Where the test gives conductivity itself, as a slug test does. */
  K: z.number().nullable().optional(),
  /** What a test without T, S or K finds, such as the losses of a well, by id. */
  others: z.record(z.string(), z.number()).optional(),
})

const calculated = z.object({
  label: z.string().trim().max(120).nullable(),
  expected: expectedResult,
  inputsSha256: z.string().length(64),
})

const byKind = <Extra extends z.ZodRawShape>(extra: Extra) =>
  z.discriminatedUnion('method', [
    calculated.extend({ method: fittedMethod, options: analysisOptions, ...extra }),
    calculated.extend({ method: kindMethodIds.slug, options: kindSchemas.slug.options, ...extra }),
    calculated.extend({ method: kindMethodIds.step, options: kindSchemas.step.options, ...extra }),
    calculated.extend({
      method: kindMethodIds['specific-capacity'],
      options: kindSchemas['specific-capacity'].options,
      ...extra,
    }),
  ])

/** The method tells the kind of test, and with it which options there are. */
export const analysisInput = byKind({})
export type AnalysisInput = z.infer<typeof analysisInput>

export const analysisUpdate = byKind({ rowVersion })
export type AnalysisUpdate = z.infer<typeof analysisUpdate>

/** Values outside the usual range are stored only when the analyst has confirmed each question. */
export const submissionInput = z.object({
  rowVersion,
  rationale: z.string().trim().min(1).max(5_000),
  confirmed: z.array(z.string().max(60)).max(20).default([]),
})
export type SubmissionInput = z.infer<typeof submissionInput>

export const takingBack = z.object({ rowVersion: z.coerce.number().pipe(rowVersion) })

export const review = z.object({
  decision: z.enum(['accepted', 'returned']),
  comment: z.string().nullable(),
  reviewer: z.string(),
  createdAt: instant,
})

/** What adopting the analysis would write, or wrote, into the regional table. */
export const adoption = z.object({
  evidence,
  /** Null where the test gives K and the thickness is not known. */
  log10ErrorT: z.number().nullable(),
  /** Where K itself was measured. */
  log10ErrorK: z.number().nullable().optional(),
  log10ErrorS: z.number().nullable(),
  storageUsable: z.boolean(),
  reasons: z.array(finding),
})

export const analysis = z.object({
  id: recordId,
  pumpingTestId: recordId,
  method: analysisMethod,
  methodVersion: z.int(),
  state: analysisState,
  options: anyOptions.nullable(),
  result: analysisResult,
  label: z.string().nullable(),
  rationale: z.string().nullable(),
  /** Null where no value can be adopted from it. */
  adoption: adoption.nullable(),
  /** The test's readings, rates or distances are no longer those that were analysed. */
  inputsChanged: z.boolean(),
  questions: z.array(finding),
  refusals: z.array(finding),
  createdBy: z.object({ id: recordId, name: z.string() }).nullable(),
  createdAt: instant,
  submittedAt: instant.nullable(),
  reviews: z.array(review),
  rowVersion,
  mayEdit: z.boolean(),
  /** Whether its submission may be taken back, so that it can be changed again. */
  mayTakeBack: z.boolean(),
  mayReview: z.boolean(),
})
export type Analysis = z.infer<typeof analysis>

export const analysisList = z.object({ items: z.array(analysis) })

/** Everything the workbench calculates with: the same snapshot that the server uses, and its hash. */
const workbenchParts = z.object({
  sha256: z.string(),
  /** Per series: seq of each reading, and its flags, so that readings can be left out with a reason. */
  readings: z.array(
    z.object({
      wellId: z.string(),
      seriesId: recordId,
      seq: z.array(z.int()),
      flags: z.array(z.string()),
      /** Drawdown before corrections; left out where there are none. */
      uncorrected_m: z.array(z.number()).optional(),
    }),
  ),
  /** Logs that give no drawdown yet, and what is missing. */
  problems: z.array(
    z.object({ wellId: z.string(), code: z.string(), params: z.record(z.string(), z.union([z.string(), z.number()])) }),
  ),
})

export const workbenchInputs = workbenchParts.extend({
  inputs: analysisInputs,
  /** Offered as boundaries; no part of what analyses rest on. */
  surroundings: z.array(surrounding),
})
export type WorkbenchInputs = z.infer<typeof workbenchInputs>

/** The same for a test of a kind of its own. */
export const kindWorkbenchInputs = z.discriminatedUnion('kind', [
  workbenchParts.extend({ kind: z.literal('slug'), inputs: kindSchemas.slug.inputs }),
  workbenchParts.extend({ kind: z.literal('step'), inputs: kindSchemas.step.inputs }),
  workbenchParts.extend({
    kind: z.literal('specific-capacity'),
    inputs: kindSchemas['specific-capacity'].inputs,
  }),
])
export type KindWorkbenchInputs = z.infer<typeof kindWorkbenchInputs>
export const anyWorkbenchInputs = z.union([kindWorkbenchInputs, workbenchInputs])

/** The losses of a pumped well by an accepted step-drawdown test: s = B·Q + C·Q^P, in SI. */
export const wellLoss = z.object({
  analysisId: recordId,
  pumpingTestId: recordId,
  method: ownMethod,
  startLocal: z.string(),
  startPrecision: z.enum(['instant', 'day', 'year']),
  losses: z.array(otherEstimate),
  rates: z.object({ low_m3_s: z.number(), high_m3_s: z.number() }),
  inputsChanged: z.boolean(),
})
export type WellLoss = z.infer<typeof wellLoss>
export const wellLossList = z.object({ items: z.array(wellLoss) })

export const reviewInput = z
  .object({
    rowVersion,
    decision: z.enum(['accepted', 'returned']),
    comment: z.string().trim().max(5_000).nullable(),
  })
  .refine(({ decision, comment }) => decision === 'accepted' || Boolean(comment), {
    path: ['comment'],
    message: 'review/comment-needed',
  })
export type ReviewInput = z.infer<typeof reviewInput>

export { storageClass }
