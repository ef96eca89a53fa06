// Reads candidate systems on stdin and answers, by code, the largest distance in metres between proj4js and PROJ's
// points, forwards and back; null when a result is not finite. Used by crs-table.py before a system is offered.
import { readFileSync } from 'node:fs'
import proj4 from 'proj4'

const systems = JSON.parse(readFileSync(0, 'utf8'))
const wgs84 = '+proj=longlat +datum=WGS84 +no_defs'
const degree = 111_320

const scaleOf = (definition) => (definition.startsWith('longlat') ? degree : 1)

function apart(system, point) {
  const operation = system.ops[point.op]
  const shift = system.def.includes('nadgrids') ? '' : ` +towgs84=${operation.shift.join(',')}`
  const own = `+proj=${system.def.replaceAll(' ', ' +')}${shift} +no_defs`
  // Westing and southing are the negatives of easting and northing; proj4js itself ignores +axis here.
  const sign = system.axis === 'ws' ? -1 : 1
  const [lon, lat] = proj4(own, wgs84, [sign * point.xy[0], sign * point.xy[1]])
  const [x, y] = proj4(wgs84, own, [point.lon, point.lat]).map((value) => sign * value)
  const [backLon, backLat] = point.back
  const east = (((lon - backLon + 540) % 360) - 180) * degree * Math.cos((backLat * Math.PI) / 180)
  const there = Math.hypot(east, (lat - backLat) * degree)
  const back = Math.hypot(x - point.xy[0], y - point.xy[1]) * scaleOf(system.def)
  return Math.max(there, back)
}

const worst = {}
for (const system of systems) {
  let most = 0
  try {
    for (const point of system.points) {
      const metres = apart(system, point)
      most = Number.isFinite(metres) && most !== null ? Math.max(most, metres) : null
    }
  } catch {
    most = null
  }
  worst[system.code] = most
}
process.stdout.write(JSON.stringify(worst))
