import type { MapWellQuery, MapWells } from '#shared/contracts/map.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { fromMercatorInts } from '#shared/geodesy/index.ts'
import type { Deps } from '../../deps.ts'
import { groupFilteredWells, groupWells, listMapWells } from './map.repository.ts'

/** Up to this many wells a view shows each of them; more are grouped. */
const mostSingle = 1_200
/** Discs in a cell of 64 pixels before they hide each other: then they are grouped too. */
const mostInCell = 30

type Group = Awaited<ReturnType<typeof groupWells>>[number]
type Cells = (Group & { valued: number })[]

const isFiltered = ({ only, from, below }: MapWellQuery) =>
  only !== undefined || from !== undefined || below !== undefined

export function createMapService({ connection: { db } }: Deps) {
  /** A well alone in its cell is shown as itself among the groups. */
  async function lonely(viewer: Viewer, query: MapWellQuery, cells: Cells) {
    const ids = cells.filter(({ count }) => count === 1).map(({ wellId }) => wellId)
    return ids.length === 0 ? [] : listMapWells(db, viewer, query, ids)
  }

  /** Few wells have a value: counting those apart spares the join of all others. */
  async function cellsOf(viewer: Viewer, query: MapWellQuery): Promise<Cells> {
    if (isFiltered(query)) {
      const groups = await groupFilteredWells(db, viewer, query)
      return groups.map((group) => ({ ...group, valued: query.only === 'none' ? 0 : group.count }))
    }
    const [groups, valued] = await Promise.all([
      groupWells(db, viewer, query),
      query.unitId === undefined ? [] : groupFilteredWells(db, viewer, { ...query, only: 'valued' }),
    ])
    const counts = new Map(valued.map(({ cell, count }) => [cell, count]))
    return groups.map((group) => ({ ...group, valued: counts.get(group.cell) ?? 0 }))
  }

  return {
    async wells(viewer: Viewer, query: MapWellQuery): Promise<MapWells> {
      const cells = await cellsOf(viewer, query)
      const total = cells.reduce((sum, { count }) => sum + count, 0)
      const valued = cells.reduce((sum, cell) => sum + cell.valued, 0)
      const grouped = total > mostSingle || tooDense(cells, query.zoom)
      const rows = grouped ? await lonely(viewer, query, cells) : await listMapWells(db, viewer, query)
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

const clusterView = ({ mx, my, count, valued }: Cells[number]) => ({ ...fromMercatorInts({ mx, my }), count, valued })

function wellView({ position: [lon, lat], log10, ...well }: Awaited<ReturnType<typeof listMapWells>>[number]) {
  return { ...well, lon, lat, value: log10 === null ? null : 10 ** log10 }
}
