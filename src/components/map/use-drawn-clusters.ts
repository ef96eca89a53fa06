import type { Map as LeafletMap } from 'leaflet'
import { computed, type ComputedRef, type Ref, type ShallowRef } from 'vue'
import type { MapCluster, MapWells } from '#shared/contracts/map.ts'
import { nearestCopy } from './map-frame.ts'
import { mergeClusters } from './merge-clusters.ts'
import type { MapWindow } from './use-map-window.ts'

/** Clusters as they are drawn: those whose rings would overlap at this zoom are one. */
export function useDrawnClusters(
  map: ShallowRef<LeafletMap | null>,
  shown: ShallowRef<MapWindow | null>,
  answer: Readonly<Ref<MapWells | null>>,
): ComputedRef<readonly MapCluster[]> {
  return computed(() => {
    const leaflet = map.value
    if (!leaflet || !shown.value || !answer.value) return []
    const { zoom, center } = shown.value
    const placed = answer.value.clusters.map((cluster) => {
      const lon = nearestCopy(cluster.lon, center.lon)
      const { x, y } = leaflet.project([cluster.lat, lon], zoom)
      return { ...cluster, lon, x, y }
    })
    return mergeClusters(placed)
  })
}
