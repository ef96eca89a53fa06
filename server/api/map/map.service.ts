import type { MapWellQuery, MapWells } from '#shared/contracts/map.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { fromMercatorInts } from '#shared/geodesy/index.ts'
import type { Deps } from '../../deps.ts'
import { groupsOf, inView, keeps, wantsValues, without, type Group, type WellValue } from './map-cells.ts'
import { createMapValues, type MapValuesNeeds } from './map-values.ts'
import { viewOf, type MapView } from './map-view.ts'
import { groupWells, listMapWells } from './map.repository.ts'

/** Up to this many wells a view shows each of them; more are grouped. */
const mostSingle = 1_200
/** Discs in a cell of 64 pixels before they hide each other: then they are grouped too. */
const mostInCell = 30

type Cells = (Group & { valued: number })[]

export function createMapService(deps: Deps, needs: MapValuesNeeds) {
  const { db } = deps.connection
  const valuesOf = createMapValues(deps, needs)

  /** Groups of all wells, or of those without a value. */
  async function countedCells(viewer: Viewer, { only }: MapWellQuery, view: MapView, shown: WellValue[]) {
    const valued = groupsOf(view, shown)
    const cells: Cells = []
    for (const group of await groupWells(db, viewer, view)) {
      const inCell = valued.get(group.cell)
      if (only !== 'none') cells.push({ ...group, valued: inCell?.count ?? 0 })
      else cells.push({ ...(inCell ? without(group, inCell) : group), valued: 0 })
    }
    return cells.filter(({ count }) => count > 0)
  }

  /** Wells that stand for themselves: where all are grouped, those alone in their cell. */
  function singles(viewer: Viewer, query: MapWellQuery, view: MapView, cells: Cells | null, shown: WellValue[]) {
    if (cells === null && !wantsValues(query)) return listMapWells(db, viewer, view)
    const alone = () => cells!.filter(({ count }) => count === 1).map(({ sumId }) => sumId)
    const ids = cells === null ? shown.map(({ wellId }) => wellId) : alone()
    return ids.length === 0 ? [] : listMapWells(db, viewer, ids)
  }

  return {
    /** Answers in whole cells of the grid: what lies in a cell at the edge of the box is there too. */
    async wells(viewer: Viewer, query: MapWellQuery): Promise<MapWells> {
      const view = viewOf(query)
      const values = await valuesOf(viewer, query)
      const within = [...values.values()].filter(inView(view))
      const shown = wantsValues(query) ? within.filter(keeps(query)) : within
      const cells = wantsValues(query)
        ? [...groupsOf(view, shown).values()].map((group) => ({ ...group, valued: group.count }))
        : await countedCells(viewer, query, view, shown)
      const total = cells.reduce((sum, { count }) => sum + count, 0)
      const valued = cells.reduce((sum, cell) => sum + cell.valued, 0)
      const grouped = total > mostSingle || tooDense(cells, query.zoom)
      const rows = await singles(viewer, query, view, grouped ? cells : null, shown)
      const wells = rows.map((row) => wellView(row, values.get(row.id)))
      return {
        wells: valuedFirst(query.only === 'none' ? wells.filter(({ value }) => value === null) : wells),
        clusters: grouped ? cells.filter(({ count }) => count > 1).map(clusterView) : [],
        total,
        valued,
      }
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

type WellRow = Awaited<ReturnType<typeof listMapWells>>[number]

function wellView({ position: [lon, lat], ...well }: WellRow, value: WellValue | undefined) {
  return { ...well, lon, lat, value: value ? 10 ** value.log10 : null, evidence: value?.evidence ?? null }
}

const valuedFirst = (wells: MapWells['wells']) => [
  ...wells.filter(({ value }) => value !== null),
  ...wells.filter(({ value }) => value === null),
]
