import { z } from 'zod'
import { boundingBox, idInPath, latitude, longitude, recordId } from './common.ts'
import { adoptedQuantity, evidence, storageClass, wellKind } from './kinds.ts'

export const mapWellQuery = z.object({
  bbox: boundingBox,
  zoom: z.coerce.number().int().min(0).max(22),
  /** The pair that colours the discs; without it every well is a hollow ring. */
  unitId: idInPath.optional(),
  quantity: adoptedQuantity.default('T'),
  storageClass: storageClass.optional(),
  /** Only wells whose value has this evidence, or that have none. */
  only: z.enum(['firm', 'fair', 'slight', 'none', 'valued']).optional(),
  /** Only wells whose value is at least / less than this, SI; an entry of the legend. */
  from: z.coerce.number().positive().optional(),
  below: z.coerce.number().positive().optional(),
})
export type MapWellQuery = z.infer<typeof mapWellQuery>

export const mapWell = z.object({
  id: recordId,
  code: z.string(),
  kind: wellKind,
  lon: longitude,
  lat: latitude,
  /** SI; null for a well without an adopted value of the chosen unit and quantity. */
  value: z.number().nullable(),
  evidence: evidence.nullable(),
})
export type MapWell = z.infer<typeof mapWell>

export const mapCluster = z.object({ lon: longitude, lat: latitude, count: z.int(), valued: z.int() })
export type MapCluster = z.infer<typeof mapCluster>

export const mapWells = z.object({
  wells: z.array(mapWell),
  clusters: z.array(mapCluster),
  total: z.int(),
  valued: z.int(),
})
export type MapWells = z.infer<typeof mapWells>

const position = z.tuple([longitude, latitude])

export const stream = z.object({ id: recordId, name: z.string(), streamOrder: z.int(), path: z.array(position) })
export type Stream = z.infer<typeof stream>
export const streamList = z.object({ items: z.array(stream) })
export const streamDetail = stream.extend({
  lengthM: z.number(),
  units: z.array(z.object({ id: recordId, name: z.string() })),
})

export const aquiferUnit = z.object({
  id: recordId,
  code: z.string(),
  name: z.string(),
  kind: z.enum(['confined', 'leaky', 'unconfined', 'aquitard']),
  depthOrder: z.int(),
  outline: z.array(z.array(position)),
  description: z.string().nullable(),
  /** Current adopted values the viewer may see. */
  valueCounts: z.object({ T: z.int(), S: z.int(), K: z.int() }),
})
export type AquiferUnit = z.infer<typeof aquiferUnit>
export const aquiferUnitList = z.object({ items: z.array(aquiferUnit) })
export const aquiferUnitDetail = aquiferUnit.extend({
  areaM2: z.number(),
  pickCount: z.int(),
  streams: z.array(z.object({ id: recordId, name: z.string() })),
})

export const boundary = z.object({
  id: recordId,
  name: z.string(),
  kind: z.enum(['fault', 'barrier', 'coast', 'constant-head']),
  path: z.array(position),
  unitIds: z.array(recordId),
})
export type Boundary = z.infer<typeof boundary>
export const boundaryList = z.object({ items: z.array(boundary) })

export const searchQuery = z.object({ text: z.string().trim().min(1).max(100) })
export const searchHit = z.object({
  kind: z.enum(['well', 'aquifer-unit', 'stream', 'pumping-test']),
  id: recordId,
  title: z.string(),
  facts: z.string(),
  lon: longitude.nullable(),
  lat: latitude.nullable(),
})
export type SearchHit = z.infer<typeof searchHit>
export const searchHits = z.object({ items: z.array(searchHit) })
