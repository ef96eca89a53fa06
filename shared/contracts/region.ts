import { z } from 'zod'
import { unitSystemId } from './account.ts'
import { latitude, longitude, rowVersion } from './common.ts'

/** Home extent in degrees: west, south, east, north. */
export const extent = z
  .tuple([longitude, latitude, longitude, latitude])
  .refine(([west, south, east, north]) => west < east && south < north, { error: 'region/extent' })

export const region = z.object({
  name: z.string(),
  /** Projected system in which distances and estimates are computed. */
  epsg: z.int(),
  extent: z.tuple([longitude, latitude, longitude, latitude]),
  unitSystem: z.string(),
  zone: z.string(),
  openToVisitors: z.boolean(),
  rowVersion,
})
export type Region = z.infer<typeof region>

export const regionEdit = z.strictObject({
  rowVersion,
  name: z.string().trim().min(1).max(120).optional(),
  extent: extent.optional(),
  unitSystem: unitSystemId.optional(),
  openToVisitors: z.boolean().optional(),
  /** Refused once the region has wells: their kept distances belong to the system they were computed in. */
  epsg: z.int().positive().optional(),
  /** IANA name of the time zone that new tests begin with. */
  zone: z.string().min(1).max(60).optional(),
})
export type RegionEdit = z.infer<typeof regionEdit>
