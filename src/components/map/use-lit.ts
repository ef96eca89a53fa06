import { useQuery } from '@pinia/colada'
import { computed, type ShallowRef, type Ref } from 'vue'
import { useRoute } from 'vue-router'
import type { MapWell } from '#shared/contracts/map.ts'
import { fetchWell } from '../../api/wells.ts'
import type { Lit } from './paint-wells.ts'
import type { Hover } from './use-map-pointer.ts'

/** What is ringed on the map: what the open sheet is about, and what the pointer is over. */
export function useLit(hover: ShallowRef<Hover | null>, wells: Readonly<Ref<readonly MapWell[]>>) {
  const route = useRoute()
  const idFor = (...names: string[]) => (names.includes(String(route.name)) ? Number(route.params.id) : null)
  const wellId = computed(() => idFor('well', 'edit-well'))
  const streamId = computed(() => idFor('stream'))

  // A well inside a cluster, or filtered away, is not among those drawn: its sheet's own data say where it is.
  const { data } = useQuery({
    key: () => ['wells', wellId.value ?? 0],
    query: ({ signal }) => fetchWell(wellId.value ?? 0, signal),
    enabled: () => wellId.value !== null,
  })

  const selected = computed(() => {
    if (wellId.value === null) return null
    const drawn = wells.value.find(({ id }) => id === wellId.value)
    return drawn ?? (data.value?.id === wellId.value ? data.value : null)
  })

  const hovered = computed<Lit | null>(() => {
    const hit = hover.value?.hit
    if (hit?.kind === 'well') return { ...hit.well, count: 1, selected: false }
    return hit?.kind === 'cluster' ? { ...hit.cluster, selected: false } : null
  })

  const lit = computed<Lit[]>(() => [
    ...(hovered.value ? [hovered.value] : []),
    ...(selected.value ? [{ lon: selected.value.lon, lat: selected.value.lat, count: 1, selected: true }] : []),
  ])
  const litStream = computed(() => {
    const hit = hover.value?.hit
    return hit?.kind === 'stream' ? hit.stream.id : streamId.value
  })
  return { lit, litStream }
}
