import { eq, inArray } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { streams, unitStreams } from '../../db/schema/index.ts'

/** Streams that exchange water with any of the units: an attribute of the unit, not a matter of distance. */
export function connectedStreams(executor: Executor, unitIds: number[]) {
  return executor
    .selectDistinct({ id: streams.id, name: streams.name, path: streams.path })
    .from(streams)
    .innerJoin(unitStreams, eq(unitStreams.streamId, streams.id))
    .where(inArray(unitStreams.unitId, unitIds))
}
