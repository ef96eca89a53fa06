import { z } from 'zod'
import { adoptedQuantity } from './adopted-values.ts'
import { analysisMethod, evidence } from './analyses.ts'
import { finding, storageClass } from './analysis-result.ts'
import { idInPath, instant, latitude, longitude, recordId } from './common.ts'

export const estimateQuantity = z.enum(['T', 'S', 'Sy', 'K'])
export type EstimateQuantity = z.infer<typeof estimateQuantity>

const coordinate = {
  lat: z.coerce.number().pipe(latitude),
  lon: z.coerce.number().pipe(longitude),
}

export const estimateQuery = z.object({
  ...coordinate,
  /** Without one: the shallowest unit at the place. */
  unitId: idInPath.optional(),
  quantity: estimateQuantity.default('T'),
  /** Depth below ground that the question is about, m. */
  depthM: z.coerce.number().min(0).max(5_000).optional(),
})
export type EstimateQuery = z.infer<typeof estimateQuery>

/** log10 of SI values. */
const distribution = z.object({
  median: z.number(),
  low80: z.number(),
  high80: z.number(),
  low95: z.number(),
  high95: z.number(),
})

const coverage = z.object({ inside: z.int(), n: z.int(), share: z.number(), meanWidth: z.number() })

export const unitAtPlace = z.object({
  id: recordId,
  code: z.string(),
  name: z.string(),
  kind: z.enum(['confined', 'leaky', 'unconfined', 'aquitard']),
})

/** A test as it is seen from a place. */
const testFromPlace = {
  pumpingTestId: recordId,
  wellId: recordId,
  wellCode: z.string(),
  lon: longitude,
  lat: latitude,
  distanceM: z.number(),
  bearingDeg: z.number(),
}

export const estimateContribution = z.object({
  valueId: recordId,
  ...testFromPlace,
  weight: z.number(),
  /** SI. */
  value: z.number(),
  evidence,
  year: z.int().nullable(),
})

export const estimate = z.object({
  lon: longitude,
  lat: latitude,
  /** In the region's projected system, m. */
  x: z.number(),
  y: z.number(),
  epsg: z.int(),
  /** Aquifer units at the place, shallow first. */
  units: z.array(unitAtPlace),
  /** Null where no unit is mapped. */
  unit: unitAtPlace.nullable(),
  quantity: estimateQuantity,
  rule: z.enum(['none', 'mean', 'assumed', 'isotropic']),
  valueCount: z.int(),
  siteCount: z.int(),
  truth: distribution.nullable(),
  newTest: distribution.nullable(),
  contributions: z.array(estimateContribution),
  secondOpinion: z.object({ value: z.number(), ratio: z.number() }).nullable(),
  excludedCount: z.int(),
  notes: z.array(finding),
  support: z.enum(['well', 'partly', 'weakly', 'none']),
  supportBecause: z.array(z.string()),
  crossValidation: z
    .object({ n: z.int(), meanError: z.number(), rmse: z.number(), coverage80: coverage, coverage95: coverage })
    .nullable(),
  variogram: z
    .object({ model: z.string(), nugget: z.number(), partialSill: z.number(), rangeM: z.number() })
    .nullable(),
  stream: z.object({ name: z.string(), distanceM: z.number() }).nullable(),
  dataVersion: z.int(),
  modelOutdated: z.boolean(),
})
export type Estimate = z.infer<typeof estimate>

export const nearbyQuery = z.object({
  ...coordinate,
  radiusM: z.coerce.number().min(1).max(100_000).default(5_000),
  unitId: idInPath.optional(),
})
export type NearbyQuery = z.infer<typeof nearbyQuery>

export const nearbyValue = z.object({
  quantity: adoptedQuantity,
  value: z.number(),
  storageClass: storageClass.nullable(),
  evidence,
  method: analysisMethod,
})

export const nearbyTest = z.object({
  ...testFromPlace,
  startAt: instant,
  year: z.int(),
  unitNames: z.array(z.string()),
  values: z.array(nearbyValue),
})
export type NearbyTest = z.infer<typeof nearbyTest>
export const nearbyTests = z.object({ items: z.array(nearbyTest), truncated: z.boolean() })
