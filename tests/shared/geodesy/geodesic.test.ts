import { readFileSync } from 'node:fs'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { compassPoint } from '#shared/geodesy/compass.ts'
import { bearing, destination, geodesicDistance } from '#shared/geodesy/geodesic.ts'

type Line = [lat1: number, lon1: number, lat2: number, lon2: number, bearing: number, back: number, distance: number]
const file = new URL('../../reference/crs-geodesics.json', import.meta.url)
const { lines } = JSON.parse(readFileSync(file, 'utf8')) as { lines: Line[] }

const lon = fc.double({ min: -180, max: 180, noNaN: true })
const lat = fc.double({ min: -89.9, max: 89.9, noNaN: true })
const place = fc.record({ lon, lat })

/** Difference of two directions in degrees, −180 to 180. */
const turn = (a: number, b: number) => ((a - b + 540) % 360) - 180

describe('the geodesic distance', () => {
  // Source: PROJ 9.1.1 `geod`, tests/reference/crs-geodesics.sh
  it.each(lines)('equals PROJ to a micrometre from %f, %f to %f, %f', (lat1, lon1, lat2, lon2, azimuth, _, metres) => {
    const [from, to] = [
      { lat: lat1, lon: lon1 },
      { lat: lat2, lon: lon2 },
    ]
    expect(Math.abs(geodesicDistance(from, to) - metres)).toBeLessThan(1.5e-6)
    if (metres > 0) expect(Math.abs(turn(bearing(from, to), azimuth))).toBeLessThan(1e-8)
  })

  // Source: Vincenty's line from Flinders Peak to Buninyong, GDA Technical Manual, from memory
  it('meets the printed test line of a national survey', () => {
    const dms = (degrees: number, minutes: number, seconds: number) => degrees + minutes / 60 + seconds / 3600
    const flinders = { lat: -dms(37, 57, 3.7203), lon: dms(144, 25, 29.5244) }
    const buninyong = { lat: -dms(37, 39, 10.1561), lon: dms(143, 55, 35.3839) }
    expect(geodesicDistance(flinders, buninyong)).toBeCloseTo(54_972.271, 3)
    expect(bearing(flinders, buninyong)).toBeCloseTo(dms(306, 52, 5.37), 5)
    expect(bearing(buninyong, flinders)).toBeCloseTo(dms(127, 10, 25.07), 5)
  })

  it('is the same both ways, and zero to itself', () => {
    fc.assert(
      fc.property(place, place, (a, b) => {
        const forth = geodesicDistance(a, b)
        return Math.abs(forth - geodesicDistance(b, a)) < 1e-6 && geodesicDistance(a, a) === 0 && forth <= 20_003_932
      }),
    )
  })

  it('is undone by going the same way', () => {
    fc.assert(
      fc.property(
        place,
        fc.double({ min: 0, max: 359, noNaN: true }),
        fc.integer({ min: 1, max: 100_000 }),
        (from, way, far) => {
          const to = destination(from, way, far)
          return Math.abs(geodesicDistance(from, to) - far) < 1e-6
        },
      ),
    )
  })

  it('is no number for a place that is none', () => {
    expect(geodesicDistance({ lon: NaN, lat: 0 }, { lon: 0, lat: 0 })).toBeNaN()
  })
})

describe('the bearing', () => {
  it.each([
    [0, 0.01, 0],
    [0.01, 0, 90],
    [0, -0.01, 180],
    [-0.01, 0, 270],
  ])('to the place %f east and %f north on the equator is %f', (lonTo, latTo, degrees) => {
    expect(bearing({ lon: 0, lat: 0 }, { lon: lonTo, lat: latTo })).toBeCloseTo(degrees, 6)
  })

  it('stays below 360 and is 0 for one place', () => {
    fc.assert(fc.property(place, place, (a, b) => bearing(a, b) >= 0 && bearing(a, b) < 360))
    expect(bearing({ lon: 5, lat: 5 }, { lon: 5, lat: 5 })).toBe(0)
  })
})

describe('the compass point', () => {
  it.each([
    [0, 'N'],
    [11.2, 'N'],
    [11.3, 'NNE'],
    [45, 'NE'],
    [90, 'E'],
    [200, 'SSW'],
    [292.5, 'WNW'],
    [348.7, 'NNW'],
    [348.8, 'N'],
    [359.9, 'N'],
    [-90, 'W'],
    [450, 'E'],
  ])('of %f is %s', (degrees, point) => expect(compassPoint(degrees)).toBe(point))
})
