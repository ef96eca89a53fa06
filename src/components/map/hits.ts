import type { AquiferUnit, Boundary, MapCluster, MapWell, Stream } from '#shared/contracts/map.ts'
import { distanceToPath, type ScreenPoint } from './screen-path.ts'
import { clusterRadius, discRadius, hollowRadius } from './well-symbols.ts'

export type Hit =
  | { kind: 'well'; well: MapWell }
  | { kind: 'cluster'; cluster: MapCluster }
  | { kind: 'stream'; stream: Stream }
  | { kind: 'unit'; unit: AquiferUnit }
  | { kind: 'boundary'; boundary: Boundary }

export interface HitTargets {
  wells: readonly MapWell[]
  clusters: readonly MapCluster[]
  streams: readonly Stream[]
  units: readonly AquiferUnit[]
  boundaries: readonly Boundary[]
}

type Project = (lon: number, lat: number) => ScreenPoint

/** Symbols are small: this much beside them still counts; fingers need more. Pixels. */
const slackOf = { mouse: 3, touch: 12 }
const LINE_REACH = { mouse: 5, touch: 10 }
export type PointerKind = keyof typeof slackOf

/** The nearest of those whose disc reaches the point; `rank` is how many pixels nearer one counts. */
function nearest<Item extends { lon: number; lat: number }>(
  items: readonly Item[],
  [x, y]: ScreenPoint,
  project: Project,
  { reach, rank = () => 0 }: { reach: (item: Item) => number; rank?: (item: Item) => number },
): Item | null {
  let found: Item | null = null
  let least = Infinity
  for (const item of items) {
    const [itemX, itemY] = project(item.lon, item.lat)
    const distance = Math.hypot(itemX - x, itemY - y)
    if (distance <= reach(item) && distance - rank(item) < least) [found, least] = [item, distance - rank(item)]
  }
  return found
}

type Path = readonly (readonly [number, number])[]

const along = (paths: readonly Path[], point: ScreenPoint, project: Project) =>
  Math.min(
    ...paths.map((path) =>
      distanceToPath(
        point,
        path.map(([lon, lat]) => project(lon, lat)),
      ),
    ),
  )

/** What lies under the point: wells before lines, lines before the outline of a unit. Null on the empty map. */
export function hitAt(
  { wells, clusters, streams, units, boundaries }: HitTargets,
  point: ScreenPoint,
  project: Project,
  { zoom, pointer = 'mouse' }: { zoom: number; pointer?: PointerKind },
): Hit | null {
  const slack = slackOf[pointer]
  const near = LINE_REACH[pointer]
  const well = nearest(wells, point, project, {
    reach: ({ value }) => (value === null ? hollowRadius(zoom) : discRadius(zoom)) + slack,
    // Discs with a value lie above the others.
    rank: ({ value }) => (value === null ? 0 : 4),
  })
  if (well) return { kind: 'well', well }
  const cluster = nearest(clusters, point, project, { reach: ({ count }) => clusterRadius(count) + slack })
  if (cluster) return { kind: 'cluster', cluster }
  const boundary = boundaries.find(({ path }) => along([path], point, project) <= near)
  if (boundary) return { kind: 'boundary', boundary }
  const stream = streams.find(({ path }) => along([path], point, project) <= near)
  if (stream) return { kind: 'stream', stream }
  const unit = units.find(({ outline }) => along(outline, point, project) <= near)
  return unit ? { kind: 'unit', unit } : null
}
