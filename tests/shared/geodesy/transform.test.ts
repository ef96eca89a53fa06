import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { CrsError } from '#shared/geodesy/crs-error.ts'
import { crsByCode, crsRefusal, searchCrs } from '#shared/geodesy/crs.ts'
import { geodesicDistance } from '#shared/geodesy/geodesic.ts'
import { fromWgs84, projectTo, toWgs84 } from '#shared/geodesy/transform.ts'

/** Degrees, minutes, seconds. */
const dms = (degrees: number, minutes: number, seconds: number) => degrees + minutes / 60 + seconds / 3600

interface Example {
  name: string
  epsg: number
  /** The geographic system of the same datum, in which the example gives latitude and longitude. */
  base: number
  lat: number
  lon: number
  x: number
  y: number
}

// Source: worked examples of EPSG Guidance Note 7-2, from memory; printed to a centimetre.
const examples: Example[] = [
  { name: 'Transverse Mercator', epsg: 27700, base: 4277, lat: 50.5, lon: 0.5, x: 577274.99, y: 69740.5 },
  { name: 'oblique stereographic', epsg: 28992, base: 4289, lat: 53, lon: 6, x: 196105.283, y: 557057.739 },
  { name: 'Lambert azimuthal equal area', epsg: 3035, base: 4258, lat: 50, lon: 5, x: 3962799.45, y: 2999718.85 },
  {
    name: 'Pseudo-Mercator',
    epsg: 3857,
    base: 4326,
    lat: dms(24, 22, 54.433),
    lon: -dms(100, 20, 0),
    x: -11169055.58,
    y: 2800000,
  },
  {
    name: 'Lambert conformal with one parallel',
    epsg: 24200,
    base: 4242,
    lat: dms(17, 55, 55.8),
    lon: -dms(76, 56, 37.26),
    x: 255966.58,
    y: 142493.51,
  },
  {
    name: 'Transverse Mercator counting west and south',
    epsg: 2053,
    base: 4148,
    lat: -dms(25, 43, 55.302),
    lon: dms(28, 16, 57.479),
    x: 71984.49,
    y: 2847342.74,
  },
]

describe('published test points', () => {
  it.each(examples)('are met: $name, EPSG:$epsg', ({ epsg, base, lat, lon, x, y }) => {
    const wgs84 = toWgs84(base, lon, lat)
    const found = fromWgs84(epsg, wgs84.lon, wgs84.lat)
    // Two centimetres: the print's last digit and the dropped height of a datum shift there and back.
    expect(Math.hypot(found.x - x, found.y - y)).toBeLessThan(0.02)
    expect(geodesicDistance(toWgs84(epsg, x, y), wgs84)).toBeLessThan(0.02)
  })
})

describe('coordinates of a system', () => {
  it('name the operation and its accuracy', () => {
    const place = toWgs84(27700, 530_000, 180_000)
    expect(place.operation).toBe('OSGB36 to WGS 84 (6), EPSG:1314')
    expect(place.accuracy_m).toBe(2)
    expect(place.insideArea).toBe(true)
  })

  it('come back to a millimetre from UTM anywhere in its zone', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 60 }),
        fc.double({ min: -2.9, max: 2.9, noNaN: true }),
        fc.double({ min: -79.9, max: -0.1, noNaN: true }),
        (zone, aside, lat) => {
          const lon = zone * 6 - 183 + aside
          const { x, y } = fromWgs84(32_700 + zone, lon, lat)
          return geodesicDistance(toWgs84(32_700 + zone, x, y), { lon, lat }) < 1e-3
        },
      ),
      { numRuns: 300 },
    )
  })

  it('agree between neighbouring zones where both hold', () => {
    const place = { lon: -24.0, lat: -38.4 }
    const east = fromWgs84(32727, place.lon, place.lat)
    const west = fromWgs84(32726, place.lon, place.lat)
    expect(geodesicDistance(toWgs84(32727, east.x, east.y), toWgs84(32726, west.x, west.y))).toBeLessThan(1e-3)
  })

  it('put a point on the middle line of a UTM zone at 500 km, scaled by 0.9996', () => {
    const { x, y } = fromWgs84(32727, -21, -38.4)
    expect(x).toBeCloseTo(500_000, 3)
    const quadrant = geodesicDistance({ lon: -21, lat: 0 }, { lon: -21, lat: -38.4 })
    expect(y).toBeCloseTo(10_000_000 - 0.9996 * quadrant, 3)
  })

  it('are shifted by the operation of the place where a system has several', () => {
    const texas = toWgs84(4267, -99, 31)
    const alaska = toWgs84(4267, -150, 64)
    expect(texas.operation).not.toBe(alaska.operation)
    expect(geodesicDistance(alaska, { lon: -150, lat: 64 })).toBeGreaterThan(50)
  })

  it('in feet give the place they give in metres', () => {
    const metres = fromWgs84(32139, -98, 31)
    const feet = fromWgs84(2277, -98, 31)
    expect(feet.x * (1200 / 3937)).toBeCloseTo(metres.x, 3)
    expect(feet.y * (1200 / 3937)).toBeCloseTo(metres.y, 3)
  })

  it('beside the area are taken and marked, far from it refused', () => {
    const beside = fromWgs84(32727, -17, -38)
    expect(toWgs84(32727, beside.x, beside.y).insideArea).toBe(false)
    expect(codeOf(() => fromWgs84(32727, -10, -38))).toBe('crs/outside-area')
  })
})

function codeOf(act: () => unknown): string {
  try {
    act()
  } catch (error) {
    if (error instanceof CrsError) return error.code
    throw error
  }
  return 'no error'
}

describe('what cannot be a place', () => {
  it.each([
    ['an unknown code', 99_999, 1, 2, 'crs/unknown'],
    ['a code without a published shift', 4490, 100, 30, 'crs/refused'],
    ['no number', 32727, NaN, 1, 'crs/not-finite'],
    ['an infinite number', 32727, 500_000, Infinity, 'crs/not-finite'],
    ['degrees given to a projected system', 32727, -21.2, -38.4, 'crs/outside-area'],
    ['metres given to a geographic system', 4326, 482_540, 5_748_670, 'crs/outside-area'],
    ['east and north swapped', 32727, 5_748_670, 482_540, 'crs/outside-area'],
    ['a latitude beyond the pole', 4326, 10, 90.1, 'crs/outside-area'],
  ])('is refused: %s', (_, epsg, x, y, code) => {
    expect(codeOf(() => toWgs84(epsg, x, y))).toBe(code)
  })

  it('never comes out as a number', () => {
    const systems = [27700, 31467, 2154, 5514, 28992, 27200, 32727, 3857, 2053, 3035, 4267]
    fc.assert(
      fc.property(
        fc.constantFrom(...systems),
        fc.double({ min: -1e8, max: 1e8 }),
        fc.double({ min: -1e8, max: 1e8 }),
        (epsg, x, y) => {
          const code = codeOf(() => {
            const { lon, lat, accuracy_m } = toWgs84(epsg, x, y)
            if (![lon, lat, accuracy_m].every(Number.isFinite)) throw new Error(`${lon} ${lat} ${accuracy_m}`)
          })
          return ['no error', 'crs/outside-area', 'crs/not-finite'].includes(code)
        },
      ),
      { numRuns: 500 },
    )
  })
})

describe('places projected together', () => {
  it('lie as far apart as on the ellipsoid, but for the scale of the projection', () => {
    const [a, b] = [
      { lon: -21.2, lat: -38.4 },
      { lon: -21.0, lat: -38.5 },
    ]
    const [p, q] = projectTo(32727, [a, b])
    const ratio = Math.hypot(p!.x - q!.x, p!.y - q!.y) / geodesicDistance(a, b)
    expect(ratio).toBeGreaterThan(0.9996 - 1e-5)
    expect(ratio).toBeLessThan(0.9996 + 1e-5)
  })

  it('are in metres east and north, also where the system counts feet or west and south', () => {
    const texas = projectTo(2277, [{ lon: -98, lat: 31 }])[0]!
    const metres = fromWgs84(32139, -98, 31)
    expect(Math.hypot(texas.x - metres.x, texas.y - metres.y)).toBeLessThan(1e-3)
    const [west, east] = projectTo(2053, [
      { lon: 28.2, lat: -25.7 },
      { lon: 28.3, lat: -25.7 },
    ])
    expect(east!.x).toBeGreaterThan(west!.x)
  })

  it('need a projected system', () => {
    expect(codeOf(() => projectTo(4326, [{ lon: 1, lat: 1 }]))).toBe('crs/refused')
    expect(projectTo(32727, [])).toEqual([])
  })
})

describe('the search for a system', () => {
  it('puts the code itself first', () => {
    expect(searchCrs('32727')[0]?.epsg).toBe(32727)
    expect(searchCrs('EPSG:27700')[0]?.epsg).toBe(27700)
  })

  it('finds by words of name and area in any order', () => {
    expect(searchCrs('27s utm').map(({ epsg }) => epsg)).toContain(32727)
    expect(searchCrs('netherlands').map(({ epsg }) => epsg)).toContain(28992)
  })

  it('finds nothing for nothing, and no more than asked for', () => {
    expect(searchCrs('  ')).toEqual([])
    expect(searchCrs('utm', 7)).toHaveLength(7)
  })

  it('tells an offered system from a refused and an unknown one', () => {
    expect(crsByCode(32727)?.name).toBe('WGS 84 / UTM zone 27S')
    expect([crsByCode(4490), crsRefusal(4490)?.reason]).toEqual([null, 'operation'])
    expect([crsByCode(1), crsRefusal(1)]).toEqual([null, null])
  })
})
