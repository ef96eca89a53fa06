import { latLng, latLngBounds, type Map as LeafletMap, type PointTuple } from 'leaflet'
import type { LonLat } from '../../composables/useMap.ts'
import { nearestCopy } from './map-frame.ts'

interface Options {
  zoom?: number | undefined
  wide: boolean
}

/** Room around a place that is brought into view; in narrow windows the sheet covers the lower part. */
function paddings(map: LeafletMap, wide: boolean): { paddingTopLeft: PointTuple; paddingBottomRight: PointTuple } {
  const { x } = map.getSize()
  const side = Math.min(60, x / 8)
  // As tall as a sheet from below (SheetPanel), and room for the symbol above it.
  const sheet = Math.min(window.innerHeight * 0.46, 420) + 28
  return {
    paddingTopLeft: [wide && x > 900 ? 300 : side, side],
    paddingBottomRight: [side, wide ? side : sheet],
  }
}

/** Moves only when the place is hidden or shown from too far. */
export function bringIntoView(map: LeafletMap | null, { lon, lat }: LonLat, { zoom = 0, wide }: Options) {
  if (!map) return
  const place = latLng(lat, nearestCopy(lon, map.getCenter().lng))
  const { paddingTopLeft, paddingBottomRight } = paddings(map, wide)
  if (map.getZoom() < zoom) {
    map.fitBounds(latLngBounds([place, place]), { paddingTopLeft, paddingBottomRight, maxZoom: zoom })
  } else {
    map.panInside(place, { paddingTopLeft, paddingBottomRight })
  }
}

export function bringAllIntoView(
  map: LeafletMap | null,
  places: readonly (readonly [lon: number, lat: number])[],
  { wide }: Options,
) {
  if (!map || places.length === 0) return
  const middle = map.getCenter().lng
  const bounds = latLngBounds(places.map(([lon, lat]) => latLng(lat, nearestCopy(lon, middle))))
  if (wide && map.getBounds().contains(bounds)) return
  map.fitBounds(bounds, { ...paddings(map, wide), maxZoom: 13 })
}
