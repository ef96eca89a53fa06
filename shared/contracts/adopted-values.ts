import { z } from 'zod'
import { analysisMethod, evidence } from './analyses.ts'
import { storageClass } from './analysis-result.ts'
import { adoptedQuantity } from './kinds.ts'
import { boundingBox, idInPath, instant, latitude, listOf, longitude, paging, recordId } from './common.ts'
import { thicknessBasis } from './pumping-tests.ts'

export { adoptedQuantity }

export const adoptedValue = z.object({
  id: recordId,
  wellId: recordId,
  wellCode: z.string(),
  lon: longitude,
  lat: latitude,
  unitId: recordId,
  unitName: z.string(),
  quantity: adoptedQuantity,
  storageClass: storageClass.nullable(),
  /** SI: m²/s, 1, m/s. */
  value: z.number().positive(),
  /** 95 % interval of the value, from the error of its logarithm. */
  low: z.number().positive(),
  high: z.number().positive(),
  log10Error: z.number().nonnegative(),
  evidence,
  method: analysisMethod,
  thicknessBasis,
  composite: z.boolean(),
  usable: z.boolean(),
  testYear: z.int(),
  pumpingTestId: recordId,
  analysisId: recordId,
  inputsChanged: z.boolean(),
  validFrom: instant,
  validTo: instant.nullable(),
  adoptedBy: z.string().nullable(),
})
export type AdoptedValue = z.infer<typeof adoptedValue>

const sorts = ['value', 'year', 'well', 'unit', 'evidence', 'method', 'quantity'] as const

export const adoptedValueFilters = z.object({
  unitId: idInPath.optional(),
  quantity: adoptedQuantity.optional(),
  storageClass: storageClass.optional(),
  evidence: evidence.optional(),
  method: analysisMethod.optional(),
  yearFrom: z.coerce.number().int().min(1800).max(2200).optional(),
  yearTo: z.coerce.number().int().min(1800).max(2200).optional(),
  text: z.string().trim().max(100).optional(),
  wellId: idInPath.optional(),
  bbox: boundingBox.optional(),
})
export type AdoptedValueFilters = z.infer<typeof adoptedValueFilters>

export const adoptedValueQuery = adoptedValueFilters.extend({
  ...paging.shape,
  sort: z.enum([...sorts, ...sorts.map((name) => `-${name}` as const)]).default('well'),
})
export type AdoptedValueQuery = z.infer<typeof adoptedValueQuery>
export type AdoptedValueSort = AdoptedValueQuery['sort']

/** Statistics of log10 values of one quantity and storage class; values in SI, the deviation in log10. */
export const adoptedStatistics = z.object({
  quantity: adoptedQuantity,
  storageClass: storageClass.nullable(),
  n: z.int(),
  geometricMean: z.number(),
  log10Sd: z.number().nullable(),
  p10: z.number(),
  p50: z.number(),
  p90: z.number(),
})
export type AdoptedStatistics = z.infer<typeof adoptedStatistics>

export const adoptedValueList = listOf(adoptedValue).extend({ statistics: z.array(adoptedStatistics) })
export type AdoptedValueList = z.infer<typeof adoptedValueList>

export const adoptedValueExportQuery = adoptedValueFilters.extend({ unitSystem: z.string().max(20).optional() })

export const adoptedHistory = z.object({ items: z.array(adoptedValue) })

export const withdrawalInput = z.object({ reason: z.string().trim().min(1).max(1_000) })
