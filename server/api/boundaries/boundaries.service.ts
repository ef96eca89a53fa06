import type { Deps } from '../../deps.ts'
import { listBoundaries, listBoundaryUnits } from './boundaries.repository.ts'

export function createBoundariesService({ connection: { db } }: Deps) {
  return {
    async list() {
      const [rows, units] = await Promise.all([listBoundaries(db), listBoundaryUnits(db)])
      const unitIds = (id: number) => units.filter(({ boundaryId }) => boundaryId === id).map(({ unitId }) => unitId)
      return { items: rows.map((row) => ({ ...row, unitIds: unitIds(row.id) })) }
    },
  }
}
