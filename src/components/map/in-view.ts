import type { AquiferUnit, Boundary, MapCluster, MapWell, Stream } from '#shared/contracts/map.ts'
import { nearestCopy } from './map-frame.ts'
import type { MapWindow } from './use-map-window.ts'

/** Everything that the map could show, whatever part of it. */
export interface OnMap {
  wells: readonly MapWell[]
  clusters: readonly MapCluster[]
  streams: readonly Stream[]
  units: readonly AquiferUnit[]
  boundaries: readonly Boundary[]
}

const byCode = (a: MapWell, b: MapWell) => a.code.localeCompare(b.code, 'en', { numeric: true })

/** What of it lies in the window. A line is in view when one of its corners is, or when it may run across. */
export function inView({ wells, clusters, streams, units, boundaries }: OnMap, { box, center }: MapWindow): OnMap {
  const [west, south, east, north] = box
  const inside = (lon: number, lat: number) => {
    const copy = nearestCopy(lon, center.lon)
    return copy >= west && copy <= east && lat >= south && lat <= north
  }
  const place = ({ lon, lat }: { lon: number; lat: number }) => inside(lon, lat)
  const crosses = (path: readonly (readonly [number, number])[]) => {
    const lons = path.map(([lon]) => nearestCopy(lon, center.lon))
    const lats = path.map(([, lat]) => lat)
    return (
      Math.min(...lons) <= east && Math.max(...lons) >= west && Math.min(...lats) <= north && Math.max(...lats) >= south
    )
  }
  return {
    wells: wells.filter(place).sort(byCode),
    clusters: clusters.filter(place).sort((a, b) => b.count - a.count),
    streams: streams.filter(({ path }) => crosses(path)),
    units: units.filter(({ outline }) => crosses(outline[0] ?? [])),
    boundaries: boundaries.filter(({ path }) => crosses(path)),
  }
}

/** Single wells and those in clusters. */
export const wellCount = ({ wells, clusters }: Pick<OnMap, 'wells' | 'clusters'>): number =>
  wells.length + clusters.reduce((sum, { count }) => sum + count, 0)
