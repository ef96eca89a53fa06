import { length, lineString, point, pointToLineDistance } from '@turf/turf'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import type { Position } from '../../db/spatial.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { notFound } from '../../errors.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { connectedStreams } from './connected.repository.ts'
import { findStream, insertStream, listStreams, unitsOfStream } from './streams.repository.ts'

export interface NearStream {
  id: number
  name: string
  distanceM: number
}

export interface NewStream {
  name: string
  /** 1 is the main river. */
  streamOrder: number
  path: Position[]
}

export function createStreamsService(deps: Deps) {
  const { db } = deps.connection
  const { now } = deps

  /** Streams connected to any of the units, nearest first, with their distance in metres. */
  async function connected(executor: Executor, unitIds: number[], place: Position): Promise<NearStream[]> {
    return (await connectedStreams(executor, unitIds))
      .map(({ id, name, path }) => ({ id, name, distanceM: distanceTo(path, place) }))
      .sort((a, b) => a.distanceM - b.distanceM)
  }

  return {
    connected,
    pathsConnected: connectedStreams,

    create: (viewer: Viewer, stream: NewStream) =>
      inTransaction(deps, async (tx) => {
        const id = await insertStream(tx, { ...stream, createdAt: now() })
        await recordAudit(tx, { viewer, at: now(), action: 'streams/create', subject: 'stream', subjectId: id })
        return { id }
      }),

    async list() {
      return { items: (await listStreams(db)).map(streamView) }
    },

    async get(id: number) {
      const row = await findStream(db, id)
      if (!row) throw notFound()
      const lengthM = length(lineString(row.path), { units: 'meters' })
      return { ...streamView(row), lengthM, units: await unitsOfStream(db, id) }
    },

    /** Null where no stream is connected to the units. */
    async nearestConnected(executor: Executor, unitIds: number[], place: Position): Promise<NearStream | null> {
      return (await connected(executor, unitIds, place))[0] ?? null
    },
  }
}

const distanceTo = (path: Position[], place: Position) =>
  pointToLineDistance(point(place), lineString(path), { units: 'meters', method: 'geodesic' })

const streamView = ({ id, name, streamOrder, path }: Awaited<ReturnType<typeof listStreams>>[number]) => ({
  id,
  name,
  streamOrder,
  path,
})
