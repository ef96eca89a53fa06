import { useQuery } from '@pinia/colada'
import { computed, watch } from 'vue'
import { fetchAquiferUnits } from '../../api/aquifer-units.ts'
import { fetchBoundaries } from '../../api/boundaries.ts'
import { fetchStreams } from '../../api/streams.ts'
import { useMapChoice } from '../../stores/map.ts'

/** Streams, units and boundaries hardly ever change. */
const STALE_MS = 5 * 60_000

/** Everything on the map that is not a well. */
export function useMapGround() {
  const choice = useMapChoice()
  const streams = useQuery({ key: ['streams'], query: ({ signal }) => fetchStreams(signal), staleTime: STALE_MS })
  const boundaries = useQuery({
    key: ['boundaries'],
    query: ({ signal }) => fetchBoundaries(signal),
    staleTime: STALE_MS,
  })
  const units = useQuery({ key: ['aquifer-units'], query: ({ signal }) => fetchAquiferUnits(signal) })
  watch(
    () => units.data.value,
    (list) => list && choice.settleUnit(list.items),
    { immediate: true },
  )

  const queries = [streams, boundaries, units]
  return {
    streams: computed(() => streams.data.value?.items ?? []),
    boundaries: computed(() => boundaries.data.value?.items ?? []),
    units: computed(() => units.data.value?.items ?? []),
    error: computed(() => queries.map(({ error }) => error.value).find(Boolean) ?? null),
    retry: () => queries.filter(({ error }) => error.value).forEach(({ refetch }) => void refetch()),
  }
}

export type MapGround = ReturnType<typeof useMapGround>
