import { IANAZone } from 'luxon'
import { crsByCode } from '#shared/geodesy/crs.ts'
import type { RegionAccess, Viewer } from '#shared/contracts/permissions.ts'
import type { Region, RegionEdit } from '#shared/contracts/region.ts'
import { defaultUnitSystemId } from '#shared/quantities/systems.ts'
import type { Executor } from '../../db/client.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, fieldError } from '../../errors.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { findRegion, hasWells, insertRegion, updateRegion, type RegionRow } from './region.repository.ts'

/** How long a process may go on with what it knows about opening to visitors. */
const accessMs = 5_000

/** A new installation shows the world until an administrator has said where its region lies. */
const newRegion = {
  name: 'New region',
  epsg: 32631,
  extent: [-170, -60, 170, 72] as [number, number, number, number],
  unitSystem: defaultUnitSystemId,
  zone: 'UTC',
}

const regionOf = ({ id: _, ...row }: RegionRow): Region => row

async function loadRegion(executor: Executor): Promise<Region> {
  const row = await findRegion(executor)
  if (row) return regionOf(row)
  await insertRegion(executor, newRegion)
  return regionOf((await findRegion(executor))!)
}

async function checkEdit(executor: Executor, before: Region, edit: RegionEdit): Promise<void> {
  if (edit.zone !== undefined && !IANAZone.isValidZone(edit.zone))
    throw fieldError('zone', 'region/zone-unknown', { zone: edit.zone })
  if (edit.epsg === undefined || edit.epsg === before.epsg) return
  if (crsByCode(edit.epsg)?.kind !== 'projected') throw fieldError('epsg', 'region/system-unknown', { epsg: edit.epsg })
  if (await hasWells(executor)) throw new AppError('region/system-fixed')
}

export function createRegionService(deps: Deps) {
  const { connection, now } = deps
  let known: { access: RegionAccess; until: number } | null = null

  return {
    get: (executor: Executor = connection.db): Promise<Region> => loadRegion(executor),

    /** What the permission check of every request needs; asked of the database every few seconds only. */
    async access(): Promise<RegionAccess> {
      const at = now().getTime()
      if (known && at < known.until) return known.access
      const { openToVisitors } = await loadRegion(connection.db)
      known = { access: { openToVisitors }, until: at + accessMs }
      return known.access
    },

    async edit(viewer: Viewer, { rowVersion, ...changes }: RegionEdit): Promise<Region> {
      const edited = await inTransaction(deps, async (tx) => {
        const before = await loadRegion(tx)
        await checkEdit(tx, before, { rowVersion, ...changes })
        if (!(await updateRegion(tx, rowVersion, changes))) throw new AppError('edit/conflict')
        await recordAudit(tx, { viewer, at: now(), action: 'region/edit', subject: 'region', details: changes })
        return loadRegion(tx)
      })
      known = null
      return edited
    },
  }
}

export type RegionService = ReturnType<typeof createRegionService>
