import { centroid, lineString, polygon } from '@turf/turf'
import type { SearchHit } from '#shared/contracts/map.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Position } from '../../db/spatial.ts'
import type { Deps } from '../../deps.ts'
import * as repository from './search.repository.ts'

const at = ([lon, lat]: Position) => ({ lon, lat })
const middle = (geometry: Parameters<typeof centroid>[0]) => at(centroid(geometry).geometry.coordinates as Position)
const depth = (depthM: number | null) => (depthM === null ? '' : `, ${depthM} m deep`)

export function createSearchService({ connection: { db } }: Deps) {
  return {
    /** Wells, units, streams and tests whose code, name or date holds the text. */
    async find(viewer: Viewer, text: string): Promise<{ items: SearchHit[] }> {
      const [wells, units, streams, tests] = await Promise.all([
        repository.findWells(db, viewer, text),
        repository.findUnits(db, text),
        repository.findStreams(db, text),
        repository.findTests(db, viewer, text),
      ])
      return {
        items: [
          ...wells.map(({ id, code, name, kind, depthM, position }) => ({
            kind: 'well' as const,
            id,
            title: name ? `${code}, ${name}` : code,
            facts: `${kind}${depth(depthM)}`,
            ...at(position),
          })),
          ...units.map(({ id, name, kind, outline }) => ({
            kind: 'aquifer-unit' as const,
            id,
            title: name,
            facts: kind,
            ...middle(polygon(outline)),
          })),
          ...streams.map(({ id, name, path }) => ({
            kind: 'stream' as const,
            id,
            title: name,
            facts: 'stream',
            ...middle(lineString(path)),
          })),
          ...tests.map(({ id, code, startAt, position }) => ({
            kind: 'pumping-test' as const,
            id,
            title: `${code}, ${startAt.toISOString().slice(0, 10)}`,
            facts: 'pumping test',
            ...at(position),
          })),
        ],
      }
    },
  }
}
