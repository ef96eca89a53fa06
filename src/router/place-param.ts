/** A place in an address: latitude, longitude. Null when it is none. */
export function readPlaceParam(text: unknown): { lat: number; lon: number } | null {
  const found = typeof text === 'string' ? /^(-?\d+(?:\.\d+)?),(-?\d+(?:\.\d+)?)$/.exec(text) : null
  const lat = Number(found?.[1] ?? NaN)
  const lon = Number(found?.[2] ?? NaN)
  return Math.abs(lat) <= 90 && Math.abs(lon) <= 180 ? { lat, lon } : null
}
