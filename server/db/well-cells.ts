import { inArray, sql, type SQL } from 'drizzle-orm'
import type { Executor } from './client.ts'
import { wellCells, wells } from './schema/index.ts'

/**
 * Sides of the squares whose wells are counted, as powers of two of the Mercator integers. A cell of 2¹² is 64 pixels at
 * zoom 10. Smaller ones would be about as many as the wells are; larger ones are summed from these fast enough.
 */
export const countedBits = [12, 14, 16] as const

const levels = sql.raw(countedBits.map((bits) => `select ${bits} as bits`).join(' union all '))

/**
 * Adds the wells to their cells (sign 1), or takes them out again (−1). Cells are written in the order of their key, so
 * that writers who meet wait for each other instead of locking each other out.
 */
async function countIn(executor: Executor, which: SQL, sign: 1 | -1): Promise<void> {
  const { mx, my, id, visibility, embargoUntil, createdBy } = wells
  await executor.execute(sql`
    insert into ${wellCells} (bits, cx, cy, visibility, embargoed, created_by, well_count, sum_id, sum_mx, sum_my)
    select level.bits, ${mx} >> level.bits as cx, ${my} >> level.bits as cy,
      ${visibility}, ${embargoUntil} is not null as embargoed, ifnull(${createdBy}, 0) as created_by,
      ${sign} * count(*), ${sign} * sum(${id}), ${sign} * sum(${mx}), ${sign} * sum(${my})
    from ${wells} cross join (${levels}) as level
    where ${which}
    group by level.bits, cx, cy, ${visibility}, embargoed, created_by
    order by level.bits, cx, cy, ${visibility}, embargoed, created_by
    on duplicate key update
      well_count = well_cells.well_count + values(well_count), sum_id = well_cells.sum_id + values(sum_id),
      sum_mx = well_cells.sum_mx + values(sum_mx), sum_my = well_cells.sum_my + values(sum_my)`)
}

/** Counts wells that were just written, in the transaction that wrote them. */
export const addToCells = (executor: Executor, which: SQL): Promise<void> => countIn(executor, which, 1)

/**
 * Changes wells in place, wherever and however visible they are afterwards: their cells follow in the same transaction.
 * The wells are locked first, so that what is taken out of the cells is what was counted.
 */
export async function recountingWells<T>(executor: Executor, ids: number[], change: () => Promise<T>): Promise<T> {
  if (ids.length === 0) return change()
  const which = inArray(wells.id, ids)
  await executor.select({ id: wells.id }).from(wells).where(which).for('update')
  await countIn(executor, which, -1)
  const changed = await change()
  await countIn(executor, which, 1)
  return changed
}
