import { z } from 'zod'
import { adoptedValue } from './adopted-values.ts'
import { instant, latitude, listOf, longitude, paging, recordId, rowVersion } from './common.ts'
import { wellKind } from './kinds.ts'
import { pumpingTestSummary, visibility } from './pumping-tests.ts'

export { wellKind }

const depth = z.number().min(0).max(5_000)

export const screen = z
  .object({ topM: depth, bottomM: depth, validFrom: instant.nullable(), validTo: instant.nullable() })
  .refine(({ topM, bottomM }) => bottomM > topM, { path: ['bottomM'], message: 'well/screen-order' })

export const unitPick = z.object({
  unitId: recordId,
  topM: depth,
  bottomM: depth.nullable(),
  source: z.string().trim().min(1).max(200),
})

export const wellInput = z.object({
  code: z.string().trim().min(1).max(40),
  name: z.string().trim().max(120).nullable(),
  kind: wellKind,
  /** Coordinates as known: east and north (or longitude and latitude) in the system with this EPSG code. */
  x: z.number(),
  y: z.number(),
  epsg: z.int().positive(),
  /** Standard deviation of the position, m. */
  positionAccuracyM: z.number().positive().max(10_000),
  groundElevationM: z.number().min(-500).max(9_000).nullable(),
  measuringPointM: z.number().min(-10).max(20).nullable(),
  verticalDatum: z.string().trim().max(40).nullable(),
  depthM: depth.nullable(),
  wellRadiusM: z.number().positive().max(10).nullable(),
  casingRadiusM: z.number().positive().max(10).nullable(),
  staticDepthM: z.number().min(-50).max(2_000).nullable(),
  drilledYear: z.int().min(1800).max(2200).nullable(),
  ownerLabel: z.string().trim().max(120).nullable(),
  notes: z.string().trim().max(5_000).nullable(),
  visibility: visibility.default('internal'),
  screens: z.array(screen).max(50).default([]),
  picks: z.array(unitPick).max(50).default([]),
  /** Said once by the person when the position is outside the region. */
  confirmOutside: z.boolean().default(false),
})
export type WellInput = z.infer<typeof wellInput>
export const wellUpdate = wellInput.extend({ rowVersion })
export type WellUpdate = z.infer<typeof wellUpdate>

export const wellSummary = z.object({
  id: recordId,
  code: z.string(),
  name: z.string().nullable(),
  kind: wellKind,
  lon: longitude,
  lat: latitude,
  depthM: z.number().nullable(),
  visibility,
})
export type WellSummary = z.infer<typeof wellSummary>

export const well = wellSummary.extend({
  originalX: z.number(),
  originalY: z.number(),
  originalEpsg: z.int(),
  positionOperation: z.string(),
  positionAccuracyM: z.number(),
  groundElevationM: z.number().nullable(),
  measuringPointM: z.number().nullable(),
  verticalDatum: z.string().nullable(),
  wellRadiusM: z.number().nullable(),
  casingRadiusM: z.number().nullable(),
  staticDepthM: z.number().nullable(),
  drilledYear: z.int().nullable(),
  ownerLabel: z.string().nullable(),
  notes: z.string().nullable(),
  embargoUntil: instant.nullable(),
  screens: z.array(
    z.object({
      topM: z.number(),
      bottomM: z.number(),
      validFrom: instant.nullable(),
      validTo: instant.nullable(),
    }),
  ),
  picks: z.array(
    z.object({
      unitId: recordId,
      unitName: z.string(),
      topM: z.number(),
      bottomM: z.number().nullable(),
      source: z.string(),
    }),
  ),
  tests: z.array(pumpingTestSummary),
  values: z.array(adoptedValue),
  rowVersion,
  mayEdit: z.boolean(),
})
export type Well = z.infer<typeof well>

export const wellList = listOf(wellSummary)
export const wellQuery = paging.extend({ text: z.string().trim().max(100).optional() })
export type WellQuery = z.infer<typeof wellQuery>
