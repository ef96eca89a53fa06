import { computed, shallowRef } from 'vue'
import { CrsError } from '#shared/geodesy/crs-error.ts'
import { formatPlanar } from '#shared/geodesy/format-position.ts'
import { useSession } from '../stores/session.ts'
import type { LonLat } from './useMap.ts'

type Geodesy = [typeof import('#shared/geodesy/transform.ts'), typeof import('#shared/geodesy/crs.ts')]

/** The table of coordinate systems is large: it comes when the first coordinates are asked for, once for all. */
const geodesy = shallowRef<Geodesy | null>(null)
let loading: Promise<unknown> | null = null

function load() {
  loading ??= Promise.all([import('#shared/geodesy/transform.ts'), import('#shared/geodesy/crs.ts')]).then(
    (loaded) => (geodesy.value = loaded),
    // Asked again by the next coordinates: the network may be back by then.
    () => (loading = null),
  )
}

/** Coordinates in the region's own system, as text: "483 940 E, 5 747 880 N". */
export function useRegionSystem() {
  const session = useSession()
  const epsg = computed(() => session.region?.epsg ?? null)

  /** Null until the system is loaded, and where it does not hold. */
  function text({ lon, lat }: LonLat): string | null {
    if (geodesy.value === null) load()
    if (geodesy.value === null || epsg.value === null) return null
    const [{ fromWgs84 }, { crsByCode }] = geodesy.value
    try {
      return formatPlanar(fromWgs84(epsg.value, lon, lat), crsByCode(epsg.value)?.axis)
    } catch (error) {
      if (error instanceof CrsError) return null
      throw error
    }
  }

  return { epsg, text }
}
