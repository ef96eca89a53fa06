import { area, polygon } from '@turf/turf'
import type { AquiferUnit } from '#shared/contracts/map.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { notFound } from '../../errors.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import * as repository from './aquifer-units.repository.ts'

type UnitRow = NonNullable<Awaited<ReturnType<typeof repository.findUnit>>>
type Counts = Awaited<ReturnType<typeof repository.countValues>>

export interface NewAquiferUnit extends Pick<
  UnitRow,
  'code' | 'name' | 'kind' | 'depthOrder' | 'outline' | 'description'
> {
  /** Streams that exchange water with the unit. */
  streamIds: number[]
}

export function createAquiferUnitsService(deps: Deps) {
  const { db } = deps.connection
  const { now } = deps

  return {
    create: (viewer: Viewer, { streamIds, ...row }: NewAquiferUnit) =>
      inTransaction(deps, async (tx) => {
        const id = await repository.insertUnit(tx, row)
        if (streamIds.length > 0) await repository.connectStreams(tx, id, streamIds)
        await recordAudit(tx, {
          viewer,
          at: now(),
          action: 'aquifer-units/create',
          subject: 'aquifer-unit',
          subjectId: id,
        })
        return { id }
      }),

    async list(viewer: Viewer) {
      const [units, counts] = await Promise.all([repository.listUnits(db), repository.countValues(db, viewer)])
      return { items: units.map((unit) => unitView(unit, counts)) }
    },

    async get(viewer: Viewer, id: number) {
      const row = await repository.findUnit(db, id)
      if (!row) throw notFound()
      const [counts, pickCount, streams] = await Promise.all([
        repository.countValues(db, viewer),
        repository.countPicks(db, viewer, id),
        repository.streamsOfUnit(db, id),
      ])
      return { ...unitView(row, counts), areaM2: area(polygon(row.outline)), pickCount, streams }
    },
  }
}

function unitView({ id, code, name, kind, depthOrder, outline, description }: UnitRow, counts: Counts): AquiferUnit {
  const of = (quantity: 'T' | 'S' | 'K') => counts.find((row) => row.unitId === id && row.quantity === quantity)?.n ?? 0
  return { id, code, name, kind, depthOrder, outline, description, valueCounts: { T: of('T'), S: of('S'), K: of('K') } }
}
