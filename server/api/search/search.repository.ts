import { and, asc, desc, eq, like, or, sql } from 'drizzle-orm'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { containing } from '../../db/like.ts'
import { readable } from '../../db/readable.ts'
import { aquiferUnits, pumpingTests, streams, wells } from '../../db/schema/index.ts'

const most = 8

/** Whole codes before beginnings before anything inside. */
const closeness = (text: string) => [
  desc(eq(wells.code, text)),
  desc(like(wells.code, `${containing(text).slice(1)}`)),
  asc(wells.code),
]

export const findWells = (executor: Executor, viewer: Viewer, text: string) =>
  executor
    .select({
      id: wells.id,
      code: wells.code,
      name: wells.name,
      kind: wells.kind,
      depthM: wells.depthM,
      position: wells.position,
    })
    .from(wells)
    .where(and(readable.wells(viewer), or(like(wells.code, containing(text)), like(wells.name, containing(text)))))
    .orderBy(...closeness(text))
    .limit(most)

export const findUnits = (executor: Executor, text: string) =>
  executor
    .select({ id: aquiferUnits.id, name: aquiferUnits.name, kind: aquiferUnits.kind, outline: aquiferUnits.outline })
    .from(aquiferUnits)
    .where(or(like(aquiferUnits.name, containing(text)), like(aquiferUnits.code, containing(text))))
    .orderBy(asc(aquiferUnits.depthOrder))
    .limit(most)

export const findStreams = (executor: Executor, text: string) =>
  executor
    .select({ id: streams.id, name: streams.name, path: streams.path })
    .from(streams)
    .where(like(streams.name, containing(text)))
    .orderBy(asc(streams.streamOrder), asc(streams.name))
    .limit(most)

export const findTests = (executor: Executor, viewer: Viewer, text: string) =>
  executor
    .select({ id: pumpingTests.id, startAt: pumpingTests.startAt, code: wells.code, position: wells.position })
    .from(pumpingTests)
    .innerJoin(wells, eq(wells.id, pumpingTests.wellId))
    .where(
      and(
        readable.pumpingTests(viewer),
        or(
          like(wells.code, containing(text)),
          sql`date_format(${pumpingTests.startAt}, '%Y-%m-%d') like ${containing(text)}`,
        ),
      ),
    )
    .orderBy(...closeness(text), desc(pumpingTests.startAt))
    .limit(most)
