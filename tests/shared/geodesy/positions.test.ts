import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { inBox, widenBox, wrapLongitude } from '#shared/geodesy/box.ts'
import { formatLonLat, formatPlanar } from '#shared/geodesy/format-position.ts'
import { geodesicDistance } from '#shared/geodesy/geodesic.ts'
import { localPlane } from '#shared/geodesy/local-plane.ts'
import { fromMercatorInts, mercatorInts } from '#shared/geodesy/mercator.ts'
import { fromWgs84 } from '#shared/geodesy/transform.ts'

const isle = { lon: -21.184, lat: -38.4172 }

describe('Web Mercator integers', () => {
  it('begin at the north-west corner and end at the south-east one', () => {
    expect(mercatorInts(-180, 85.06)).toEqual({ mx: 0, my: 0 })
    expect(mercatorInts(179.9999999, -90)).toEqual({ mx: 2 ** 24 - 1, my: 2 ** 24 - 1 })
    expect(mercatorInts(0, 0)).toEqual({ mx: 2 ** 23, my: 2 ** 23 })
  })

  it('are the same numbers that EPSG:3857 gives', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -179, max: 179, noNaN: true }),
        fc.double({ min: -85, max: 85, noNaN: true }),
        (lon, lat) => {
          const half = Math.PI * 6_378_137
          const { x, y } = fromWgs84(3857, lon, lat)
          const { mx, my } = mercatorInts(lon, lat)
          const step = (2 * half) / 2 ** 24
          return Math.abs((x + half) / step - mx - 0.5) < 0.501 && Math.abs((half - y) / step - my - 0.5) < 0.501
        },
      ),
    )
  })

  it('lead back into their own cell, within two metres of the place', () => {
    const cell = mercatorInts(isle.lon, isle.lat)
    const middle = fromMercatorInts(cell)
    expect(mercatorInts(middle.lon, middle.lat)).toEqual(cell)
    expect(geodesicDistance(isle, middle)).toBeLessThan(1.7)
  })

  it('shifted by zoom give the tile', () => {
    const { mx, my } = mercatorInts(isle.lon, isle.lat)
    const n = 2 ** 10
    const rise = Math.log(Math.tan(Math.PI / 4 + (isle.lat * Math.PI) / 360)) / Math.PI
    expect([mx >> 14, my >> 14]).toEqual([Math.floor(((isle.lon + 180) / 360) * n), Math.floor(((1 - rise) / 2) * n)])
  })
})

describe('the local plane', () => {
  const plane = localPlane(isle.lon, isle.lat)

  it('keeps distances to 3 parts in 100,000 within 50 km of its middle', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -0.5, max: 0.5, noNaN: true }),
        fc.double({ min: -0.4, max: 0.4, noNaN: true }),
        (east, north) => {
          const place = { lon: isle.lon + east, lat: isle.lat + north }
          const { x, y } = plane.toPlane(place)
          const metres = geodesicDistance(isle, place)
          return Math.abs(Math.hypot(x, y) - metres) <= 3.2e-5 * metres + 1e-6
        },
      ),
    )
  })

  it('has its origin in the middle and leads back', () => {
    expect(Math.hypot(plane.toPlane(isle).x, plane.toPlane(isle).y)).toBeLessThan(1e-6)
    expect(geodesicDistance(plane.fromPlane({ x: 20_000, y: -9_000 }), isle)).toBeCloseTo(Math.hypot(20_000, 9_000), 0)
    const again = plane.toPlane(plane.fromPlane({ x: 20_000, y: -9_000 }))
    expect([again.x, again.y].map((value) => Math.round(value * 1e4) / 1e4)).toEqual([20_000, -9_000])
  })

  it('refuses an origin that is no place', () => {
    expect(() => localPlane(NaN, 0)).toThrow(RangeError)
    expect(() => localPlane(0, 91)).toThrow(RangeError)
  })
})

describe('a written position', () => {
  it('says degrees with compass letters', () => {
    expect(formatLonLat(isle)).toBe('38.4172° S, 21.1840° W')
    expect(formatLonLat({ lon: 181, lat: 0 }, 2)).toBe('0.00° N, 179.00° W')
    expect(formatLonLat({ lon: 180, lat: 12.5 }, 1)).toBe('12.5° N, 180.0° E')
  })

  it('says east and north with narrow spaces, west and south where the system counts so', () => {
    expect(formatPlanar({ x: 483_940.2, y: 5_747_879.6 })).toBe('483\u202f940 E, 5\u202f747\u202f880 N')
    expect(formatPlanar({ x: 71_984.49, y: 2_847_342.74 }, 'ws', 1)).toBe('71\u202f984.5 W, 2\u202f847\u202f342.7 S')
  })
})

describe('a box of longitudes and latitudes', () => {
  it('may cross the date line', () => {
    const box = [170, -20, -170, -10] as const
    expect(inBox({ lon: 179, lat: -15 }, box)).toBe(true)
    expect(inBox({ lon: -175, lat: -15 }, box)).toBe(true)
    expect(inBox({ lon: 0, lat: -15 }, box)).toBe(false)
  })

  it('grows by half its size, by no more than asked, and not past the poles', () => {
    expect(widenBox([10, 40, 12, 41], 3)).toEqual([9, 39.5, 13, 41.5])
    expect(widenBox([-24, -80, -18, 0], 3)).toEqual([-27, -83, -15, 3])
    expect(widenBox([-180, -90, 180, 90], 3)).toEqual([-180, -90, 180, 90])
    expect(widenBox([176, -10, -178, 0], 3)).toEqual([173, -13, -175, 3])
  })

  it('counts longitudes from −180 up', () => {
    expect([190, -190, 180, 540, 0].map(wrapLongitude)).toEqual([-170, 170, -180, -180, 0])
  })
})
