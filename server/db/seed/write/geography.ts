import type { Services } from '../../../api/services.ts'
import type { Executor } from '../../client.ts'
import { aquiferUnits, boundaries, streams } from '../../schema/index.ts'
import type { DemoRecords } from '../records/types.ts'
import type { Cast } from './people.ts'

/** Ids of the aquifer units by their code. */
export type UnitIds = Map<string, number>

async function writeRegion({ region }: Services, { administrator }: Cast, records: DemoRecords) {
  const { rowVersion, name: known } = await region.get()
  const { name, epsg, extent, zone } = records.region
  if (known !== name) await region.edit(administrator, { rowVersion, name, epsg, extent, zone })
}

async function writeStreams(services: Services, { steward }: Cast, executor: Executor, records: DemoRecords) {
  const known = new Map((await executor.select().from(streams)).map(({ name, id }) => [name, id]))
  const ids = new Map<string, number>()
  for (const { code, name, order, path } of records.streams) {
    const id = known.get(name) ?? (await services.streams.create(steward, { name, streamOrder: order, path })).id
    ids.set(code, id)
  }
  return ids
}

async function writeUnits(
  services: Services,
  { steward }: Cast,
  executor: Executor,
  records: DemoRecords,
  streamIds: Map<string, number>,
) {
  const ids: UnitIds = new Map((await executor.select().from(aquiferUnits)).map(({ code, id }) => [code, id]))
  for (const { code, name, kind, depthOrder, outline, description, connectedStreams } of records.units) {
    if (ids.has(code)) continue
    const connected = connectedStreams.map((stream) => streamIds.get(stream)!)
    const unit = { code, name, kind, depthOrder, outline: [outline], description, streamIds: connected }
    ids.set(code, (await services.aquiferUnits.create(steward, unit)).id)
  }
  return ids
}

async function writeBoundaries(
  services: Services,
  { steward }: Cast,
  executor: Executor,
  records: DemoRecords,
  unitIds: UnitIds,
) {
  const known = new Set((await executor.select().from(boundaries)).map(({ name }) => name))
  for (const { name, kind, path, units } of records.boundaries) {
    if (known.has(name)) continue
    await services.boundaries.create(steward, { name, kind, path, unitIds: units.map((unit) => unitIds.get(unit)!) })
  }
}

/** Region, streams, units and boundaries, each only when it is not there yet. */
export async function writeGeography(
  services: Services,
  cast: Cast,
  executor: Executor,
  records: DemoRecords,
): Promise<UnitIds> {
  await writeRegion(services, cast, records)
  const streamIds = await writeStreams(services, cast, executor, records)
  const unitIds = await writeUnits(services, cast, executor, records, streamIds)
  await writeBoundaries(services, cast, executor, records, unitIds)
  return unitIds
}
