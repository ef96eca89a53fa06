import type { MapWellQuery, MapWells } from '#shared/contracts/map.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { fromMercatorInts } from '#shared/geodesy/index.ts'
import type { Deps } from '../../deps.ts'
import { viewOf, type MapView } from './map-view.ts'
import { groupValuedWells, groupWells, listMapWells } from './map.repository.ts'

/** Up to this many wells a view shows each of them; more are grouped. */
const mostSingle = 1_200
/** Discs in a cell of 64 pixels before they hide each other: then they are grouped too. */
const mostInCell = 30

type Group = Awaited<ReturnType<typeof groupWells>>[number]
type Cells = (Group & { valued: number })[]

/** Whether only wells are wanted whose value has some property. */
const wantsValues = ({ only, from, below }: MapWellQuery) =>
  (only !== undefined && only !== 'none') || from !== undefined || below !== undefined

/** A group without the wells that are counted in another group of the cell. */
const without = (group: Group, { count, sumId, sumMx, sumMy }: Group): Group => ({
  cell: group.cell,
  count: group.count - count,
  sumId: group.sumId - sumId,
  sumMx: group.sumMx - sumMx,
  sumMy: group.sumMy - sumMy,
})

export function createMapService({ connection: { db } }: Deps) {
  /** A well alone in its cell is shown as itself among the groups. */
  async function lonely(viewer: Viewer, query: MapWellQuery, view: MapView, cells: Cells) {
    const ids = cells.filter(({ count }) => count === 1).map(({ sumId }) => sumId)
    return ids.length === 0 ? [] : listMapWells(db, viewer, query, view, ids)
  }

  /** Few wells have a value: counting those apart spares the join of all others. */
  async function cellsOf(viewer: Viewer, query: MapWellQuery, view: MapView): Promise<Cells> {
    const valuedGroups = () => groupValuedWells(db, viewer, query, view)
    if (wantsValues(query)) return (await valuedGroups()).map((group) => ({ ...group, valued: group.count }))
    const [groups, valued] = await Promise.all([
      groupWells(db, viewer, view),
      query.unitId === undefined ? [] : groupValuedWells(db, viewer, { ...query, only: 'valued' }, view),
    ])
    const valuedIn = new Map(valued.map((group) => [group.cell, group]))
    return groups.flatMap((group) => {
      const inCell = valuedIn.get(group.cell)
      if (query.only !== 'none') return [{ ...group, valued: inCell?.count ?? 0 }]
      const bare = inCell ? without(group, inCell) : group
      return bare.count > 0 ? [{ ...bare, valued: 0 }] : []
    })
  }

  return {
    /** Answers in whole cells of the grid: what lies in a cell at the edge of the box is there too. */
    async wells(viewer: Viewer, query: MapWellQuery): Promise<MapWells> {
      const view = viewOf(query)
      const cells = await cellsOf(viewer, query, view)
      const total = cells.reduce((sum, { count }) => sum + count, 0)
      const valued = cells.reduce((sum, cell) => sum + cell.valued, 0)
      const grouped = total > mostSingle || tooDense(cells, query.zoom)
      const rows = grouped ? await lonely(viewer, query, view, cells) : await listMapWells(db, viewer, query, view)
      const clusters = grouped ? cells.filter(({ count }) => count > 1) : []
      return { wells: rows.map(wellView), clusters: clusters.map(clusterView), total, valued }
    },
  }
}

/** Half of the wells stand closer than can be told apart; further in than street level nothing would be gained. */
function tooDense(cells: Cells, zoom: number): boolean {
  const crowded = cells.filter(({ count }) => count > mostInCell)
  const inCrowds = crowded.reduce((sum, { count }) => sum + count, 0)
  const total = cells.reduce((sum, { count }) => sum + count, 0)
  return zoom < 15 && inCrowds > total / 2
}

const clusterView = ({ sumMx, sumMy, count, valued }: Cells[number]) => ({
  ...fromMercatorInts({ mx: sumMx / count, my: sumMy / count }),
  count,
  valued,
})

function wellView({ position: [lon, lat], log10, ...well }: Awaited<ReturnType<typeof listMapWells>>[number]) {
  return { ...well, lon, lat, value: log10 === null ? null : 10 ** log10 }
}
