import { parseNumber } from '#shared/quantities/parse.ts'
import { parseAngle, type Angle, type AngleProblem } from './angle.ts'
import { wrapLongitude } from './box.ts'
import { CrsError, type CrsErrorCode } from './crs-error.ts'
import { likelySlip, type Slip } from './slip.ts'
import { splitPair } from './split-pair.ts'
import { toWgs84 } from './transform.ts'
import type { Box, LonLat } from './types.ts'

export type PlaceErrorCode =
  | AngleProblem
  | CrsErrorCode
  | 'place/two-numbers'
  | 'place/letters'
  | 'place/range'
  | 'place/swapped'
  | 'place/needs-system'

/** What was typed and how it became a place. */
export interface PlaceSource {
  epsg: number
  x: number
  y: number
  operation: string
  accuracy_m: number
}

export interface FoundPlace extends LonLat {
  kind: 'place'
  source: PlaceSource
  /** Set when the place is far from the region and a common slip would explain it. */
  slip: Slip | null
}

export interface PlaceError {
  kind: 'error'
  code: PlaceErrorCode
  params: Record<string, string | number>
}

/** `none`: the text does not look like coordinates; it may be the name of a well. */
export type PlaceResult = FoundPlace | PlaceError | { kind: 'none' }

export interface PlaceOptions {
  /** Home extent of the region, to notice swapped coordinates and forgotten signs (default: no such check). */
  region?: Box
}

const none = { kind: 'none' } as const
const failed = (code: PlaceErrorCode, params: PlaceError['params'] = {}): PlaceError => ({
  kind: 'error',
  code,
  params,
})

const withCode = /^\s*EPSG\s*[:\s]\s*(\d{3,6})\s*[:;,]?\s*(.*)$/is
/** Two numbers must follow, because `1203: north` is rather the name of a well. */
const withBareCode = /^\s*(\d{4,6})\s*:\s*([NSEW\d+\-−.][^:]*\s[^:]*\d[^:]*)$/i
const coordinateText = /^[\d\s.,;:+\-−°º˚'’′‵"”“″NSEW]+$/i
/** `101`, `4 12` and the like are rather the names of wells. */
const looksMeant = /[.,;°º'′"″]|[-+−]\s*\d|\d\s*[NSEW]\b|\b[NSEW]\s*\d/i
const projectedNumber = /^[-+−]?\d{5,}/

/** Longer texts are no coordinates, and matching them would take time. */
const longest = 120

type Letters = 'en' | 'ne' | 'ws' | 'sw' | null

/** `482540 E`: the number, and the letter behind or before it. */
function metricPart(text: string): { value: number; letter: string } | null {
  const found = /^([NSEW]?)\s*(.*?)\s*(?:m\s*)?([NSEW]?)$/i.exec(text)
  const number = parseNumber(found?.[2] ?? '')
  if (!found || !('value' in number) || (found[1] && found[3])) return null
  return { value: number.value, letter: (found[1] || found[3] || '').toLowerCase() }
}

function inSystem(epsg: number, rest: string, options: PlaceOptions): PlaceResult {
  const parts = splitPair(rest)?.map(metricPart)
  const [first, second] = parts ?? []
  if (!first || !second) return failed('place/two-numbers', { epsg, text: rest.slice(0, 80) })
  const letters = (first.letter + second.letter || null) as Letters
  if (letters !== null && !['en', 'ne', 'ws', 'sw'].includes(letters)) return failed('place/letters')
  const turned = letters === 'ne' || letters === 'sw'
  const [x, y] = turned ? [second.value, first.value] : [first.value, second.value]
  return located(epsg, x, y, options)
}

function located(epsg: number, x: number, y: number, options: PlaceOptions): PlaceResult {
  try {
    const { lon, lat, operation, accuracy_m } = toWgs84(epsg, x, y)
    const slip = options.region ? likelySlip({ lon, lat }, options.region) : null
    return { kind: 'place', lon, lat, source: { epsg, x, y, operation, accuracy_m }, slip }
  } catch (error) {
    if (error instanceof CrsError) return failed(error.code, error.params)
    throw error
  }
}

/** Without letters the first is the latitude; with letters they decide. Null when the letters contradict each other. */
function latitudeFirst(first: Angle, second: Angle): LonLat | null {
  const northern = (angle: Angle) => angle.letter === 'N' || angle.letter === 'S'
  if (first.letter === null && second.letter === null) return { lat: first.degrees, lon: second.degrees }
  if (first.letter === null || second.letter === null || northern(first) === northern(second)) return null
  return northern(first) ? { lat: first.degrees, lon: second.degrees } : { lat: second.degrees, lon: first.degrees }
}

function checked({ lon, lat }: LonLat, options: PlaceOptions): PlaceResult {
  // Longitudes counted to 360 eastwards are in use; a latitude beyond the pole is not.
  if (Math.abs(lat) <= 90 && Math.abs(lon) <= 360)
    return located(4326, lon > 180 || lon < -180 ? wrapLongitude(lon) : lon, lat, options)
  if (Math.abs(lat) <= 180 && Math.abs(lon) <= 90) return failed('place/swapped', { lat: lon, lon: lat })
  return failed('place/range', { lat, lon })
}

function inDegrees(text: string, options: PlaceOptions): PlaceResult {
  const parts = coordinateText.test(text) ? splitPair(text) : null
  if (parts?.every((part) => projectedNumber.test(part)))
    return failed('place/needs-system', { text: text.slice(0, 80) })
  if (!parts || !looksMeant.test(text)) return none
  const [first, second] = parts.map(parseAngle)
  if (!first || !second) return none
  if ('problem' in first) return failed(first.problem)
  if ('problem' in second) return failed(second.problem)
  const place = latitudeFirst(first, second)
  return place ? checked(place, options) : failed('place/letters')
}

/**
 * A place in a typed text. `a, b` is latitude, longitude, in degrees or degrees, minutes, seconds, with or without
 * compass letters; `32727: 482540 5748670` and `EPSG:32727 482540 5748670` are east, north in that system.
 * Reads the table of coordinate systems: load lazily in the browser.
 */
export function parsePlace(text: string, options: PlaceOptions = {}): PlaceResult {
  if (text.length > longest) return none
  const coded = withCode.exec(text)
  if (coded?.[1]) return inSystem(Number(coded[1]), coded[2] ?? '', options)
  const bare = withBareCode.exec(text)
  if (bare) return inSystem(Number(bare[1]), bare[2] ?? '', options)
  return inDegrees(text.trim(), options)
}
