import type { Map as LeafletMap } from 'leaflet'
import { onScopeDispose, shallowRef, watch, type ShallowRef } from 'vue'
import type { LonLat } from '../../composables/useMap.ts'
import type { DegreeBox } from './fetch-box.ts'

export interface MapWindow {
  /** West, south, east, north; may reach past the date line. */
  box: DegreeBox
  zoom: number
  center: LonLat
}

function windowOf(map: LeafletMap): MapWindow {
  const bounds = map.getBounds()
  const { lat, lng: lon } = map.getCenter()
  return {
    box: [bounds.getWest(), bounds.getSouth(), bounds.getEast(), bounds.getNorth()],
    zoom: map.getZoom(),
    center: { lon, lat },
  }
}

/** What the map shows, each time it has come to rest; null until it stands. */
export function useMapWindow(map: ShallowRef<LeafletMap | null>): ShallowRef<MapWindow | null> {
  const shown = shallowRef<MapWindow | null>(null)
  const update = () => (shown.value = map.value && windowOf(map.value))
  watch(
    map,
    (now, before) => {
      before?.off('moveend resize', update)
      now?.on('moveend resize', update)
      update()
    },
    { immediate: true },
  )
  onScopeDispose(() => map.value?.off('moveend resize', update))
  return shown
}
