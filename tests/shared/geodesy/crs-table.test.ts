import { createHash } from 'node:crypto'
import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { inBox } from '#shared/geodesy/box.ts'
import { converterOf } from '#shared/geodesy/converter.ts'
import table from '#shared/geodesy/crs-table.json' with { type: 'json' }
import { crsTable } from '#shared/geodesy/crs-table.ts'
import { geodesicDistance } from '#shared/geodesy/geodesic.ts'

type Row = [
  code: number,
  operation: number,
  lon: number,
  lat: number,
  x: number,
  y: number,
  lonOfXy: number,
  latOfXy: number,
  cs2cs: number | null,
]
const read = (name: string) => readFileSync(new URL(`../../reference/${name}`, import.meta.url), 'utf8')
const reference = JSON.parse(read('crs-points.json')) as { provenance: Record<string, string>; points: Row[] }
const systems = [...crsTable().systems.values()]
const pointsOf = new Map<number, Row[]>()
for (const row of reference.points) pointsOf.set(row[0], [...(pointsOf.get(row[0]) ?? []), row])

const centimetre = 0.01
const metresInDegree = 111_320

/** Largest distance in metres between proj4js and PROJ at the centre and corners of a system's area, there and back. */
function worstDifference(code: number): number {
  const system = crsTable().systems.get(code)!
  const apart = (pointsOf.get(code) ?? []).map(([, index, lon, lat, x, y, lonOfXy, latOfXy]) => {
    const converter = converterOf(system, system.operations[index]!)
    const place = converter.toWgs84({ x, y })
    const point = converter.fromWgs84({ lon, lat })
    if (!place || !point) return Infinity
    const there = geodesicDistance(place, { lon: lonOfXy, lat: latOfXy })
    const back = Math.hypot(point.x - x, point.y - y) * (system.metresPerUnit ?? metresInDegree)
    return Math.max(there, back)
  })
  return Math.max(...apart)
}

// Source: PROJ 9.1.1 with EPSG v10.076, `cct` with the pipeline of the same operation, tests/reference/crs-table.py
describe('every offered coordinate system', () => {
  it('equals PROJ to a centimetre at the centre and the corners of its area, there and back', () => {
    const off = systems
      .map(({ epsg, name }) => ({ epsg, name, metres: worstDifference(epsg) }))
      .filter(({ metres }) => !(metres <= centimetre))
    expect(off).toEqual([])
  })

  it('has reference points for each of its operations', () => {
    const missing = systems.filter(({ epsg, operations }) => {
      const covered = new Set(pointsOf.get(epsg)?.map(([, index]) => index))
      return operations.some((_, index) => !covered.has(index))
    })
    expect(missing.map(({ epsg }) => epsg)).toEqual([])
  })

  it('equals what cs2cs answers for the plain codes, where its datum is taken as WGS 84', () => {
    const unshifted = new Set(
      systems.filter(({ operations }) => operations.every(({ towgs84 }) => towgs84 === null)).map(({ epsg }) => epsg),
    )
    const rows = reference.points.filter(([code, , , , , , , , cs2cs]) => unshifted.has(code) && cs2cs !== null)
    const off = rows.filter((row) => row[8]! > centimetre)
    expect(rows.length).toBeGreaterThan(3_000)
    expect(off).toEqual([])
  })

  // Common practice: shifts between old and new datums are known to tens of metres everywhere.
  it('has no two operations that contradict each other by more than 100 m where both hold', () => {
    const contradictions = systems.flatMap((system) =>
      (pointsOf.get(system.epsg) ?? []).flatMap(([epsg, , lon, lat, x, y]) => {
        const holding = system.operations.filter(({ area }) => area === null || inBox({ lon, lat }, area))
        const places = holding.flatMap((operation) => converterOf(system, operation).toWgs84({ x, y }) ?? [])
        const apart = places.flatMap((a) => places.map((b) => geodesicDistance(a, b)))
        const most = Math.max(0, ...apart)
        return most > 100 ? [{ epsg, lon, lat, most }] : []
      }),
    )
    expect(contradictions).toEqual([])
  })

  it('states an area, an accuracy and a unit', () => {
    for (const { area, box, accuracy_m, metresPerUnit, kind } of systems) {
      expect(area).not.toBe('')
      expect(box.every(Number.isFinite)).toBe(true)
      expect(accuracy_m).toBeGreaterThanOrEqual(0)
      expect(accuracy_m).toBeLessThan(100)
      expect(metresPerUnit === null).toBe(kind === 'geographic')
    }
  })
})

describe('the table', () => {
  it('was made by the script beside its reference points, as it is now', () => {
    const hash = createHash('sha256').update(read('crs-table.py')).digest('hex')
    expect(table.provenance.scriptSha256).toBe(hash)
    expect(reference.provenance.scriptSha256).toBe(hash)
  })

  it('stays small enough to be sent to a browser', () => {
    expect(JSON.stringify(table).length).toBeLessThan(150_000)
  })

  it('offers the systems of the world and of many countries', () => {
    const zones = (first: number, count: number) => Array.from({ length: count }, (_, i) => first + i)
    const expected = [
      ...[4326, 3857, 4258, 4269, 4267, 4230, 4674, 3035, 3034],
      ...zones(32601, 60),
      ...zones(32701, 60),
      ...zones(25829, 8),
      ...zones(26902, 21),
      ...zones(26710, 10),
      ...[23029, 23030, 23031, 27700, 28992, 31370, 31466, 31467, 31468, 31469, 2154, 27572, 2056, 21781, 3067, 3006],
      ...[5514, 3003, 3004, 2100, 3763, 29903, 2157, 31287, 2180, 23700, 3301, 3059, 3346],
      ...zones(28349, 8),
      ...zones(7849, 8),
      ...[2193, 27200, 2053, 31983, 6677, 2039, 3414, 2326, 2277],
    ]
    expect(expected.filter((code) => !crsTable().systems.has(code))).toEqual([])
  })

  it('refuses by name what PROJ itself gives no grid-free shift for', () => {
    const { systems: offered, refusals } = crsTable()
    expect(refusals.get(4490)?.reason).toBe('operation')
    expect([...refusals.keys()].filter((code) => offered.has(code))).toEqual([])
  })

  it('says of NAD27 that a grid would be better', () => {
    const nad27 = crsTable().systems.get(26714)!
    expect(nad27.accuracyWithGrid_m).toBeLessThan(nad27.accuracy_m)
  })
})
