import { z } from 'zod'
import { unitsOf } from '../quantities/units.ts'
import { listOf, paging, recordId, rowVersion } from './common.ts'
import { seriesSummary } from './pumping-tests.ts'

const column = z.int().min(0).max(999)
const lengthUnit = z.enum(unitsOf('length').map(({ id }) => id) as [string, ...string[]])

/** How to read a log; the shape is that of shared/readings/model.ts. */
export const logMapping = z.object({
  delimiter: z.enum([',', ';', '\t', '|', ' ']),
  decimalMark: z.enum(['.', ',']),
  firstDataRow: z.int().positive(),
  time: z.discriminatedUnion('kind', [
    z.object({
      kind: z.literal('elapsed'),
      column,
      unit: z.enum(['s', 'min', 'h', 'd', 'h:m:s', 'm:s']),
      zero_s: z.number().min(-1e10).max(1e10),
    }),
    z.object({
      kind: z.literal('clock'),
      column,
      dateColumn: column.nullable(),
      dateOrder: z.enum(['ymd', 'dmy', 'mdy']).nullable(),
      zone: z.string().max(60).nullable(),
    }),
  ]),
  value: z.object({ column, quantity: z.enum(['depth', 'level', 'drawdown']), unit: lengthUnit }),
})

export const seriesInput = z.object({ testWellId: recordId, mapping: logMapping })
export type SeriesInput = z.infer<typeof seriesInput>

/** JSON that travels as the text of one part of a form. */
export const jsonText = z
  .string()
  .max(10_000)
  .transform((text, context) => {
    try {
      return JSON.parse(text) as unknown
    } catch {
      context.addIssue({ code: 'custom', message: 'field/invalid' })
      return z.NEVER
    }
  })

/** Travels beside the file in one multipart form. */
export const seriesForm = z.object({ request: jsonText.pipe(seriesInput) })

const params = z.record(z.string(), z.union([z.string(), z.number()]))
export const rowIssue = z.object({ code: z.string(), field: z.string(), params })

export const seriesCreated = z.object({
  series: seriesSummary,
  /** How often each finding occurred. */
  counts: z.record(z.string(), z.int()),
})
export type SeriesCreated = z.infer<typeof seriesCreated>

/** One line of the file and what became of it. */
export const readingRow = z.object({
  seq: z.int(),
  fileRow: z.int(),
  raw: z.string(),
  elapsedS: z.number().nullable(),
  valueM: z.number().nullable(),
  taken: z.boolean(),
  /** After the analyst's decisions. */
  included: z.boolean(),
  issues: z.array(rowIssue),
  decision: z.object({ action: z.enum(['leave-out', 'take']), reason: z.string(), by: z.string() }).nullable(),
})
export type ReadingRow = z.infer<typeof readingRow>

export const readingRows = listOf(readingRow)
export const readingRowQuery = paging.extend({
  /** Only rows that were not taken, that were flagged, or that somebody decided about. */
  only: z.enum(['all', 'not-taken', 'flagged', 'decided']).default('all'),
})
export type ReadingRowQuery = z.infer<typeof readingRowQuery>

export const readingDecision = z.object({
  seqs: z.array(z.int().nonnegative()).min(1).max(20_000),
  action: z.enum(['leave-out', 'take']),
  reason: z.string().trim().min(1).max(300),
})
export type ReadingDecision = z.infer<typeof readingDecision>

export const seriesDeletion = z.object({ rowVersion: z.coerce.number().pipe(rowVersion) })
