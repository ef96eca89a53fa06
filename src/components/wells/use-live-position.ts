import { computed, toValue, type MaybeRefOrGetter } from 'vue'
import { CrsError } from '#shared/geodesy/crs-error.ts'
import { formatLonLat } from '#shared/geodesy/format-position.ts'
import { errorText } from '#shared/words/errors/index.ts'
import { slipQuestion } from '#shared/words/geodesy.ts'
import { useGeodesy, type Geodesy } from '../../composables/useGeodesy.ts'
import { useSession } from '../../stores/session.ts'
import type { LonLat } from '../../composables/useMap.ts'

export interface GivenPosition {
  epsg: number
  x: number | null
  y: number | null
}

export interface LivePosition {
  /** Null while coordinates are missing or have no place. */
  place: LonLat | null
  /** What stands there in degrees, or why there is no such place. */
  sentence: string
  problem: boolean
  /** The place that was probably meant, with the question about it. */
  slip: { question: string; place: LonLat } | null
}

const nothing = (sentence = '', problem = false): LivePosition => ({ place: null, sentence, problem, slip: null })

function read(geodesy: Geodesy, { epsg, x, y }: GivenPosition, region: readonly [number, number, number, number]) {
  if (x === null || y === null) return nothing()
  try {
    const { lon, lat, accuracy_m } = geodesy.toWgs84(epsg, x, y)
    const slip = geodesy.likelySlip({ lon, lat }, region)
    const shift = accuracy_m > 0.5 ? `; the datum shift is good to ${accuracy_m} m` : ''
    return {
      place: { lon, lat },
      sentence: `${formatLonLat({ lon, lat }, 5)}${shift}`,
      problem: false,
      slip: slip && { question: slipQuestion(slip.code, formatLonLat(slip)), place: { lon: slip.lon, lat: slip.lat } },
    }
  } catch (error) {
    if (error instanceof CrsError) return nothing(errorText(error.code, error.params), true)
    throw error
  }
}

/** Where typed coordinates lie, while they are typed; and the coordinates of a place in the form's system. */
export function useLivePosition(given: MaybeRefOrGetter<GivenPosition>) {
  const session = useSession()
  const geodesy = useGeodesy()
  const position = computed(() => {
    const region = session.region
    return geodesy.value && region ? read(geodesy.value, toValue(given), region.extent) : nothing()
  })
  const system = computed(() => geodesy.value?.crsByCode(toValue(given).epsg) ?? null)

  /** Rounded to about a centimetre. Longitude and latitude where the system does not reach. */
  function coordinatesOf({ lon, lat }: LonLat): { epsg: number; x: number; y: number } {
    const { epsg } = toValue(given)
    const round = (value: number, decimals: number) => Number(value.toFixed(decimals))
    const degrees = { epsg: 4326, x: round(lon, 7), y: round(lat, 7) }
    if (!geodesy.value || system.value?.kind !== 'projected') return degrees
    try {
      const { x, y } = geodesy.value.fromWgs84(epsg, lon, lat)
      return { epsg, x: round(x, 2), y: round(y, 2) }
    } catch (error) {
      if (error instanceof CrsError) return degrees
      throw error
    }
  }

  return { position, system, coordinatesOf }
}
