import { z } from 'zod'
import { methods } from '../hydraulics/catalogue.ts'
import { analysisInputs, analysisOptions, analysisResult, finding, storageClass } from './analysis-result.ts'
import { instant, recordId, rowVersion } from './common.ts'
import { evidence } from './kinds.ts'

/** Registering a method in the hydraulics catalogue is all that is needed for it to be accepted here. */
export const fittedMethod = z.enum(Object.keys(methods) as [keyof typeof methods])
export const analysisMethod = z.union([fittedMethod, z.literal('reported')])
export const analysisState = z.enum(['draft', 'submitted', 'accepted', 'returned', 'withdrawn'])
export { evidence }

/** What the browser calculated; the server refuses to store when its own numbers differ. */
export const expectedResult = z.object({
  methodVersion: z.int(),
  T: z.number().nullable(),
  S: z.number().nullable(),
})

export const analysisInput = z.object({
  method: fittedMethod,
  options: analysisOptions,
  label: z.string().trim().max(120).nullable(),
  expected: expectedResult,
  inputsSha256: z.string().length(64),
})
export type AnalysisInput = z.infer<typeof analysisInput>

export const analysisUpdate = analysisInput.extend({ rowVersion })
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
  log10ErrorT: z.number(),
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
  options: analysisOptions.nullable(),
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
export const workbenchInputs = z.object({
  inputs: analysisInputs,
  sha256: z.string(),
  /** Per series: seq of each reading, and its flags, so that readings can be left out with a reason. */
  readings: z.array(
    z.object({
      wellId: z.string(),
      seriesId: recordId,
      seq: z.array(z.int()),
      flags: z.array(z.string()),
    }),
  ),
  /** Logs that give no drawdown yet, and what is missing. */
  problems: z.array(
    z.object({ wellId: z.string(), code: z.string(), params: z.record(z.string(), z.union([z.string(), z.number()])) }),
  ),
})
export type WorkbenchInputs = z.infer<typeof workbenchInputs>

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
