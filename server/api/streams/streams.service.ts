import { lineString, point, pointToLineDistance } from '@turf/turf'
import type { Executor } from '../../db/client.ts'
import type { Position } from '../../db/spatial.ts'
import type { Deps } from '../../deps.ts'
import { connectedStreams } from './connected.repository.ts'

export interface NearStream {
  id: number
  name: string
  distanceM: number
}

export function createStreamsService(_deps: Deps) {
  return {
    /** The nearest stream that is connected to one of the units, with its distance in metres; null where none is. */
    async nearestConnected(executor: Executor, unitIds: number[], place: Position): Promise<NearStream | null> {
      const near = (await connectedStreams(executor, unitIds))
        .map(({ id, name, path }) => ({ id, name, distanceM: distanceTo(path, place) }))
        .sort((a, b) => a.distanceM - b.distanceM)
      return near[0] ?? null
    },
  }
}

const distanceTo = (path: Position[], place: Position) =>
  pointToLineDistance(point(place), lineString(path), { units: 'meters', method: 'geodesic' })
