import type { Map as LeafletMap } from 'leaflet'
import { inject, onScopeDispose, provide, shallowRef, watchEffect, type InjectionKey, type ShallowRef } from 'vue'

export interface LonLat {
  lon: number
  lat: number
}

/** What a sheet draws on the map: a place, and ochre lines to the wells that carried its estimate. */
export interface MapMarks {
  place: LonLat | null
  /** The line is the wider, the larger the weight; weights add up to one. */
  contributions: readonly (LonLat & { weight: number })[]
  /** The sheet draws a circle around the place itself; the legend says so. */
  radius?: boolean
}

export interface MapHandle {
  /** Leaflet's own map; null until it stands. */
  readonly map: ShallowRef<LeafletMap | null>
  readonly marks: ShallowRef<MapMarks | null>
  /** Ringed on the map: the well that the open sheet is about. */
  readonly selected: ShallowRef<LonLat | null>
  setMarks(marks: MapMarks | null): void
  /** Brings a place into view when it is not, as little as needed; `zoom` is the least it is shown at. */
  show(place: LonLat, zoom?: number): void
  /** Brings a whole line or outline into view. */
  showAll(places: readonly (readonly [lon: number, lat: number])[]): void
  /** Clicks on the map go to the handler until the returned function is called; the newest handler has them. */
  takeClicks(handler: (place: LonLat) => void): () => void
  /** The handler that clicks go to now. */
  readonly clicks: ShallowRef<((place: LonLat) => void) | null>
}

const key: InjectionKey<MapHandle> = Symbol('map')

export const provideMap = (handle: MapHandle) => provide(key, handle)

/** The map behind a sheet. @throws when used outside the map's page */
export function useMap(): MapHandle {
  const handle = inject(key, null)
  if (!handle) throw new Error('useMap belongs inside the page of the map')
  return handle
}

/** The map behind a form that is also used where there is none. */
export const useMapIfAny = (): MapHandle | null => inject(key, null)

/** Marks that follow the sheet's data and go with the sheet. */
export function useMapMarks(marks: () => MapMarks | null) {
  const { setMarks } = useMap()
  watchEffect(() => setMarks(marks()))
  onScopeDispose(() => setMarks(null))
}

/** Rings a place while the sheet about it is open. */
export function useMapSelection(place: () => LonLat | null) {
  const { selected } = useMap()
  watchEffect(() => (selected.value = place()))
  onScopeDispose(() => (selected.value = null))
}

/** Everything of the handle that does not need Leaflet. */
export function createHandle(show: MapHandle['show'], showAll: MapHandle['showAll']): MapHandle {
  const marks = shallowRef<MapMarks | null>(null)
  const takers: ((place: LonLat) => void)[] = []
  const clicks = shallowRef<((place: LonLat) => void) | null>(null)
  const update = () => (clicks.value = takers.at(-1) ?? null)
  return {
    map: shallowRef(null),
    selected: shallowRef(null),
    marks,
    clicks,
    show,
    showAll,
    setMarks: (wanted) => (marks.value = wanted),
    takeClicks(handler) {
      takers.push(handler)
      update()
      return () => {
        takers.splice(takers.indexOf(handler), 1)
        update()
      }
    },
  }
}
