import { z } from 'zod'
import { outsideQuantities, outsideQuantityIds, type OutsideQuantity } from '../hydraulics/corrections/kinds.ts'
import { isUnitId } from '../quantities/units.ts'
import { finding } from './analysis-result.ts'
import { instant, listOf, paging, recordId, rowVersion } from './common.ts'
import { jsonText, logMapping, rowIssue } from './reading-series.ts'

export const outsideQuantity = z.enum(outsideQuantityIds as [OutsideQuantity])

/** How to read a series from outside: as a log, with a quantity and unit of its own. */
export const outsideMapping = logMapping.extend({
  value: z
    .object({ column: z.int().min(0).max(999), quantity: outsideQuantity, unit: z.string().max(20) })
    .refine(({ quantity, unit }) => isUnitId(unit, outsideQuantities[quantity].dimension), {
      path: ['unit'],
      message: 'correction/unit',
    }),
})
export type OutsideMapping = z.infer<typeof outsideMapping>

export const outsideInput = z.object({
  /** "Barometer at the office". */
  label: z.string().trim().min(1).max(60),
  mapping: outsideMapping,
  /** The series in whose place it comes; corrections that follow that one follow this one then. */
  replaces: recordId.nullable().default(null),
})
export type OutsideInput = z.input<typeof outsideInput>

/** Travels beside the file in one multipart form, as JSON text. */
export const outsideForm = z.object({ request: jsonText.pipe(outsideInput) })

export const outsideSummary = z.object({
  id: recordId,
  quantity: outsideQuantity,
  label: z.string(),
  fileName: z.string(),
  rowCount: z.int(),
  takenCount: z.int(),
  /** On the clock of the test, seconds. */
  firstS: z.number(),
  lastS: z.number(),
  /** Extremes in SI: Pa or m. */
  lowest: z.number(),
  highest: z.number(),
  findings: z.array(finding),
  by: z.string(),
  createdAt: instant,
  rowVersion,
})
export type OutsideSummary = z.infer<typeof outsideSummary>

export const outsideCreated = z.object({
  series: outsideSummary,
  /** How often each finding about rows occurred. */
  counts: z.record(z.string(), z.int()),
})

/** One line of the file and what became of it; the value in SI. */
export const outsideRow = z.object({
  seq: z.int(),
  fileRow: z.int(),
  raw: z.string(),
  elapsedS: z.number().nullable(),
  value: z.number().nullable(),
  taken: z.boolean(),
  issues: z.array(rowIssue),
})
export type OutsideRow = z.infer<typeof outsideRow>
export const outsideRows = listOf(outsideRow)
export const outsideRowQuery = paging.extend({ only: z.enum(['all', 'not-taken', 'flagged']).default('all') })
export type OutsideRowQuery = z.infer<typeof outsideRowQuery>

/** What was taken, every so many of a long series, for drawing; values in SI. */
export const outsideValues = z.object({ elapsed_s: z.array(z.number()), value: z.array(z.number()) })
export type OutsideValues = z.infer<typeof outsideValues>

export const outsideDeletion = z.object({ rowVersion: z.coerce.number().pipe(rowVersion) })
