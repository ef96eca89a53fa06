import proj4 from 'proj4'
import type { Crs, DatumOperation } from './crs-table.ts'
import type { LonLat, PlanarPoint } from './types.ts'

const wgs84 = '+proj=longlat +datum=WGS84 +no_defs'

/** A way between one system and WGS 84 by one operation; null stands for a result that is not a finite number. */
export interface Converter {
  toWgs84: (point: PlanarPoint) => LonLat | null
  fromWgs84: (point: LonLat) => PlanarPoint | null
}

function proj4Text(system: Crs, operation: DatumOperation): string {
  // @null says "no datum step at all" (Web Mercator); with shift parameters beside it proj4js would apply both.
  const shift = system.definition.includes('nadgrids') ? '' : ` +towgs84=${operation.towgs84 ?? '0,0,0'}`
  return `${system.definition}${shift} +no_defs`
}

/** proj4js throws for some impossible coordinates and answers NaN or Infinity for others. */
function pair(convert: () => number[]): [number, number] | null {
  try {
    const [first = NaN, second = NaN] = convert()
    return Number.isFinite(first) && Number.isFinite(second) ? [first, second] : null
  } catch {
    return null
  }
}

/** Degrees on WGS 84 stay as they were typed, to the last digit. */
const unchanged: Converter = {
  toWgs84: ({ x, y }) => ({ lon: x, lat: y }),
  fromWgs84: ({ lon, lat }) => ({ x: lon, y: lat }),
}

function makeConverter(system: Crs, operation: DatumOperation): Converter {
  if (system.epsg === 4326) return unchanged
  const both = proj4(proj4Text(system, operation), wgs84)
  // Westing and southing are the negatives of easting and northing.
  const sign = system.axis === 'ws' ? -1 : 1
  return {
    toWgs84({ x, y }) {
      const found = pair(() => both.forward([sign * x, sign * y]))
      return found && { lon: found[0], lat: found[1] }
    },
    fromWgs84({ lon, lat }) {
      const found = pair(() => both.inverse([lon, lat]))
      return found && { x: sign * found[0], y: sign * found[1] }
    },
  }
}

// Reading a definition takes longer than a thousand conversions. Operations are shared between systems, so both are keys.
const made = new WeakMap<Crs, Map<DatumOperation, Converter>>()

export function converterOf(system: Crs, operation: DatumOperation): Converter {
  const own = made.get(system) ?? new Map<DatumOperation, Converter>()
  made.set(system, own)
  const converter = own.get(operation) ?? makeConverter(system, operation)
  own.set(operation, converter)
  return converter
}
