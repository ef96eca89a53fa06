import { computed, type ShallowRef } from 'vue'
import { useRoute } from 'vue-router'
import type { LonLat } from '../../composables/useMap.ts'
import type { Hit } from './hits.ts'
import type { Lit } from './paint-wells.ts'
import type { Hover } from './use-map-pointer.ts'

const targetOf = (hit: Hit): unknown => Object.values(hit).find((part) => typeof part === 'object')

/** What is ringed on the map: what the open sheet is about, and what the pointer is over. */
export function useLit(hover: ShallowRef<Hover | null>, selected: ShallowRef<LonLat | null>) {
  const route = useRoute()

  /** The same object while the pointer moves over one thing, so that nothing is drawn anew for it. */
  const hovering = computed<Hit | null>((before) => {
    const hit = hover.value?.hit ?? null
    return before && hit && targetOf(before) === targetOf(hit) ? before : hit
  })
  const hovered = computed<Lit | null>(() => {
    const hit = hovering.value
    if (hit?.kind === 'well') return { ...hit.well, count: 1, selected: false }
    return hit?.kind === 'cluster' ? { ...hit.cluster, selected: false } : null
  })

  const lit = computed<Lit[]>(() => [
    ...(hovered.value ? [hovered.value] : []),
    ...(selected.value ? [{ ...selected.value, count: 1, selected: true }] : []),
  ])
  const litStream = computed(() => {
    const hit = hovering.value
    if (hit?.kind === 'stream') return hit.stream.id
    return route.name === 'stream' ? Number(route.params.id) : null
  })
  return { lit, litStream }
}
