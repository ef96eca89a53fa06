import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Position } from '../../db/spatial.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { boundariesOfUnits, insertBoundary, listBoundaries, listBoundaryUnits } from './boundaries.repository.ts'

export interface NewBoundary {
  name: string
  kind: 'fault' | 'barrier' | 'coast' | 'constant-head'
  path: Position[]
  /** Units it affects, at least one. */
  unitIds: number[]
}

export function createBoundariesService(deps: Deps) {
  const { db } = deps.connection
  const { now } = deps

  return {
    create: (viewer: Viewer, { unitIds, ...row }: NewBoundary) =>
      inTransaction(deps, async (tx) => {
        const id = await insertBoundary(tx, row, unitIds)
        await recordAudit(tx, { viewer, at: now(), action: 'boundaries/create', subject: 'boundary', subjectId: id })
        return { id }
      }),

    /** Boundaries of any of the units, at least one. */
    affecting: boundariesOfUnits,

    async list() {
      const [rows, units] = await Promise.all([listBoundaries(db), listBoundaryUnits(db)])
      const unitIds = (id: number) => units.filter(({ boundaryId }) => boundaryId === id).map(({ unitId }) => unitId)
      return { items: rows.map((row) => ({ ...row, unitIds: unitIds(row.id) })) }
    },
  }
}
