import type { LeafletMouseEvent, Map as LeafletMap } from 'leaflet'
import { onScopeDispose, shallowRef, watch, type ShallowRef } from 'vue'
import type { LonLat } from '../../composables/useMap.ts'
import { hitAt, type Hit, type HitTargets, type PointerKind } from './hits.ts'
import { nearestCopy } from './map-frame.ts'

interface Answers {
  targets: () => HitTargets
  onHit: (hit: Hit, at: LonLat) => void
  onEmpty: (place: LonLat) => void
  /** Has all clicks while it is there, whatever lies under them (a form that asks for a place). */
  taker: () => ((place: LonLat) => void) | null
}

export interface Hover {
  hit: Hit
  /** In the window of the map. */
  x: number
  y: number
}

const pointerOf = ({ originalEvent }: LeafletMouseEvent): PointerKind =>
  'pointerType' in originalEvent && originalEvent.pointerType === 'touch' ? 'touch' : 'mouse'

function hitOf(map: LeafletMap, event: LeafletMouseEvent, targets: HitTargets): Hit | null {
  const middle = map.getCenter().lng
  const project = (lon: number, lat: number) => {
    const { x, y } = map.latLngToContainerPoint([lat, nearestCopy(lon, middle)])
    return [x, y] as const
  }
  const { x, y } = event.containerPoint
  return hitAt(targets, [x, y], project, { zoom: map.getZoom(), pointer: pointerOf(event) })
}

/** What the pointer is over, what it points at, and what a click means. */
export function useMapPointer(map: ShallowRef<LeafletMap | null>, { targets, onHit, onEmpty, taker }: Answers) {
  const hover = shallowRef<Hover | null>(null)
  const pointed = shallowRef<LonLat | null>(null)

  function moved(event: LeafletMouseEvent) {
    const { lng, lat } = event.latlng.wrap()
    pointed.value = { lon: lng, lat }
    const hit = map.value && hitOf(map.value, event, targets())
    hover.value = hit ? { hit, x: event.containerPoint.x, y: event.containerPoint.y } : null
  }

  function left() {
    hover.value = null
    pointed.value = null
  }

  function clicked(event: LeafletMouseEvent) {
    const { lng: lon, lat } = event.latlng.wrap()
    const take = taker()
    if (take) return take({ lon, lat })
    const hit = map.value && hitOf(map.value, event, targets())
    if (hit) onHit(hit, { lon, lat })
    else onEmpty({ lon, lat })
  }

  const events = { mousemove: moved, mouseout: left, movestart: () => (hover.value = null), click: clicked }
  watch(map, (now) => now?.on(events), { immediate: true })
  onScopeDispose(() => map.value?.off(events))
  return { hover, pointed }
}
