import { area, polygon } from '@turf/turf'
import type { AquiferUnit } from '#shared/contracts/map.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Deps } from '../../deps.ts'
import { notFound } from '../../errors.ts'
import * as repository from './aquifer-units.repository.ts'

type UnitRow = NonNullable<Awaited<ReturnType<typeof repository.findUnit>>>
type Counts = Awaited<ReturnType<typeof repository.countValues>>

export function createAquiferUnitsService({ connection: { db } }: Deps) {
  return {
    async list(viewer: Viewer) {
      const [units, counts] = await Promise.all([repository.listUnits(db), repository.countValues(db, viewer)])
      return { items: units.map((unit) => unitView(unit, counts)) }
    },

    async get(viewer: Viewer, id: number) {
      const row = await repository.findUnit(db, id)
      if (!row) throw notFound()
      const [counts, pickCount, streams] = await Promise.all([
        repository.countValues(db, viewer),
        repository.countPicks(db, id),
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
