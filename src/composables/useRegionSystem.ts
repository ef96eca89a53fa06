import { computed } from 'vue'
import { CrsError } from '#shared/geodesy/crs-error.ts'
import { formatPlanar } from '#shared/geodesy/format-position.ts'
import { useSession } from '../stores/session.ts'
import { useGeodesy } from './useGeodesy.ts'
import type { LonLat } from './useMap.ts'

/** Coordinates in the region's own system, as text: "483 940 E, 5 747 880 N". */
export function useRegionSystem() {
  const session = useSession()
  const epsg = computed(() => session.region?.epsg ?? null)

  /** Null until the system is loaded, and where it does not hold. */
  function text({ lon, lat }: LonLat): string | null {
    const geodesy = useGeodesy().value
    if (geodesy === null || epsg.value === null) return null
    try {
      return formatPlanar(geodesy.fromWgs84(epsg.value, lon, lat), geodesy.crsByCode(epsg.value)?.axis)
    } catch (error) {
      if (error instanceof CrsError) return null
      throw error
    }
  }

  return { epsg, text }
}
