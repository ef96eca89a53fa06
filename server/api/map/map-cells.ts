import type { MapWellQuery } from '#shared/contracts/map.ts'
import { mercatorBits } from '#shared/geodesy/index.ts'
import type { MapView, Span } from './map-view.ts'
import type { groupWells, listValues } from './map.repository.ts'

/** Wells of one cell of a view: how many, and the sums of their ids and places. */
export type Group = Awaited<ReturnType<typeof groupWells>>[number]
/** A current value of a unit at a well. */
export type WellValue = Awaited<ReturnType<typeof listValues>>[number]

type Filter = Pick<MapWellQuery, 'only' | 'from' | 'below'>

/** Whether only wells are wanted whose value has some property. */
export const wantsValues = ({ only, from, below }: Filter): boolean =>
  (only !== undefined && only !== 'none') || from !== undefined || below !== undefined

/** Whether the query's filter leaves a well with this value. */
export function keeps({ only, from, below }: Filter): (value: Pick<WellValue, 'evidence' | 'log10'>) => boolean {
  const evidence = only === 'valued' ? undefined : only
  const [least, under] = [from && Math.log10(from), below && Math.log10(below)]
  return (value) =>
    (evidence === undefined || value.evidence === evidence) &&
    (least === undefined || value.log10 >= least) &&
    (under === undefined || value.log10 < under)
}

const within = ([from, to]: Span, cell: number) => cell >= from && cell <= to

export const inView =
  ({ bits, columns, rows }: MapView) =>
  ({ mx, my }: Pick<WellValue, 'mx' | 'my'>): boolean =>
    within(rows, my >> bits) && columns.some((span) => within(span, mx >> bits))

/** Groups as the database makes them. */
export function groupsOf({ bits }: MapView, values: readonly WellValue[]): Map<number, Group> {
  const groups = new Map<number, Group>()
  for (const { wellId, mx, my } of values) {
    const cell = (mx >> bits) * 2 ** mercatorBits + (my >> bits)
    const { count, sumId, sumMx, sumMy } = groups.get(cell) ?? { count: 0, sumId: 0, sumMx: 0, sumMy: 0 }
    groups.set(cell, { cell, count: count + 1, sumId: sumId + wellId, sumMx: sumMx + mx, sumMy: sumMy + my })
  }
  return groups
}

/** A group without the wells that are counted in another group of the cell. */
export const without = (group: Group, { count, sumId, sumMx, sumMy }: Group): Group => ({
  cell: group.cell,
  count: group.count - count,
  sumId: group.sumId - sumId,
  sumMx: group.sumMx - sumMx,
  sumMy: group.sumMy - sumMy,
})
