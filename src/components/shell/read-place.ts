import { formatLonLat, formatPlanar } from '#shared/geodesy/format-position.ts'
import { parsePlace, type FoundPlace } from '#shared/geodesy/place.ts'
import { crsByCode } from '#shared/geodesy/crs.ts'
import type { Box, LonLat } from '#shared/geodesy/types.ts'
import { slipQuestion } from '#shared/words/geodesy.ts'
import { errorText, type ErrorCode } from '#shared/words/errors/index.ts'

export interface ReadPlace extends LonLat {
  title: string
  facts: string
}

export interface PlaceReading {
  places: ReadPlace[]
  /** Why coordinates could not be read, as a sentence. */
  problem: string | null
}

/** What was typed, as it was understood: "483 940 E, 5 747 880 N in WGS 84 / UTM zone 27S". */
function sourceText({ source: { epsg, x, y } }: FoundPlace): string {
  const system = crsByCode(epsg)
  return system?.kind === 'projected'
    ? `${formatPlanar({ x, y }, system.axis)} in ${system.name}`
    : 'Latitude, longitude'
}

/** The place in a typed text, and behind it the one that was probably meant. Loaded with the coordinate systems. */
export function readPlace(text: string, region: Box | undefined): PlaceReading {
  const result = parsePlace(text, region ? { region } : {})
  if (result.kind === 'none') return { places: [], problem: null }
  if (result.kind === 'error') return { places: [], problem: errorText(result.code as ErrorCode, result.params) }
  const { lon, lat, slip } = result
  const typed = { title: formatLonLat({ lon, lat }), facts: sourceText(result), lon, lat }
  if (!slip) return { places: [typed], problem: null }
  const meant = formatLonLat(slip)
  const question = slipQuestion(slip.code, meant)
  return { places: [{ title: meant, facts: question, lon: slip.lon, lat: slip.lat }, typed], problem: null }
}
