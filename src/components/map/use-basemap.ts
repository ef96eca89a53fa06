import { computed } from 'vue'
import { useMapChoice } from '../../stores/map.ts'
import { useSession } from '../../stores/session.ts'

/** The maps that may lie under the data, and the one that does: the chosen one, else the first. */
export function useBasemap() {
  const session = useSession()
  const choice = useMapChoice()
  const basemaps = computed(() => session.current?.basemaps ?? [])
  const basemap = computed(() => basemaps.value.find(({ id }) => id === choice.basemapId) ?? basemaps.value[0] ?? null)
  return { basemaps, basemap }
}
