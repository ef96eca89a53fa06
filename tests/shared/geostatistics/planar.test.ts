import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { convexHull } from '#shared/geostatistics/hull.ts'
import {
  bearing,
  closeRings,
  crosses,
  distanceToLines,
  extent,
  insideRings,
  type Polyline,
} from '#shared/geostatistics/planar.ts'

const square: Polyline = [[0, 0], [10, 0], [10, 10], [0, 10]] // prettier-ignore
const hole: Polyline = [[4, 4], [6, 4], [6, 6], [4, 6]] // prettier-ignore
const wall: Polyline = [[0, 5], [10, 5]] // prettier-ignore

describe('bearings', () => {
  it.each([
    [0, 1, 0],
    [1, 0, 90],
    [0, -1, 180],
    [-1, 0, 270],
    [1, 1, 45],
  ])('towards (%i, %i) is %i degrees', (x, y, degrees) => {
    expect(bearing({ x: 0, y: 0 }, { x, y })).toBeCloseTo(degrees, 12)
  })
})

describe('crossing lines', () => {
  it('is seen across, not beside or along a gap', () => {
    expect(crosses({ x: 3, y: 0 }, { x: 3, y: 10 }, [wall])).toBe(true)
    expect(crosses({ x: 11, y: 0 }, { x: 11, y: 10 }, [wall])).toBe(false)
    expect(crosses({ x: 3, y: 0 }, { x: 3, y: 4.9 }, [wall])).toBe(false)
  })

  it('counts touching the end of a barrier', () => {
    expect(crosses({ x: 10, y: 0 }, { x: 10, y: 10 }, [wall])).toBe(true)
  })

  it('is the same in both directions', () => {
    const n = fc.integer({ min: -20, max: 20 })
    fc.assert(
      fc.property(n, n, n, n, (a, b, c, d) => {
        expect(crosses({ x: a, y: b }, { x: c, y: d }, [wall])).toBe(crosses({ x: c, y: d }, { x: a, y: b }, [wall]))
      }),
    )
  })
})

describe('rings', () => {
  it('hold what lies inside and not what lies in a hole', () => {
    expect(insideRings({ x: 2, y: 2 }, [square, hole])).toBe(true)
    expect(insideRings({ x: 5, y: 5 }, [square, hole])).toBe(false)
    expect(insideRings({ x: 12, y: 5 }, [square, hole])).toBe(false)
  })

  it('are at a distance whether closed or not', () => {
    expect(distanceToLines({ x: -3, y: 5 }, closeRings([square]))).toBeCloseTo(3, 12)
    expect(distanceToLines({ x: 13, y: 14 }, closeRings([square]))).toBeCloseTo(5, 12)
    expect(distanceToLines({ x: 0, y: 0 }, [])).toBe(Infinity)
  })
})

describe('hull', () => {
  it('keeps the corners and drops what lies within or on an edge', () => {
    const points = [...square, [5, 5], [5, 0]].map(([x, y]) => ({ x: x as number, y: y as number }))
    expect(convexHull(points)).toEqual(square)
  })

  it('holds every point', () => {
    const point = fc.record({ x: fc.integer({ min: 0, max: 99 }), y: fc.integer({ min: 0, max: 99 }) })
    fc.assert(
      fc.property(fc.array(point, { minLength: 3, maxLength: 40 }), (points) => {
        const hull = convexHull(points)
        for (const p of points) {
          const on = distanceToLines(p, closeRings([hull])) < 1e-9
          expect(on || insideRings(p, [hull])).toBe(true)
        }
      }),
    )
  })

  it('of many points is that of the few on its edge', () => {
    const inner = Array.from({ length: 500 }, (_, i) => ({ x: 1 + ((i * 7) % 80) / 10, y: 1 + ((i * 13) % 80) / 10 }))
    const corners = square.map(([x, y]) => ({ x, y }))
    expect(convexHull([...inner, ...corners])).toEqual(square)
  })

  it('of one point is that point, of none is empty', () => {
    expect(convexHull([{ x: 1, y: 2 }])).toEqual([[1, 2]])
    expect(convexHull([])).toEqual([])
    expect(extent([])).toBe(0)
  })
})
