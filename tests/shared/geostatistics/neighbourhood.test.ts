import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { createNeighbourhood } from '#shared/geostatistics/neighbourhood.ts'
import type { Point } from '#shared/geostatistics/planar.ts'

const place = fc.record({ x: fc.integer({ min: 0, max: 1000 }), y: fc.integer({ min: 0, max: 1000 }) })
const far = (a: Point, b: Point): number => Math.hypot(a.x - b.x, a.y - b.y)

describe('neighbourhood', () => {
  it('finds the nearest as a plain sort does', () => {
    fc.assert(
      fc.property(
        fc.array(place, { minLength: 1, maxLength: 80 }),
        place,
        fc.integer({ min: 1, max: 12 }),
        (points, at, k) => {
          const plain = points.map((p) => far(p, at)).sort((a, b) => a - b).slice(0, k) // prettier-ignore
          const found = createNeighbourhood(points).nearest(at, k).map((i) => far(points[i]!, at)) // prettier-ignore
          expect(found).toEqual(plain)
        },
      ),
    )
  })

  it('looks in all directions when one is crowded', () => {
    const crowd = Array.from({ length: 200 }, (_, i) => ({ x: 50 + i * 0.1, y: 20 }))
    const lonely = [0, 1, 2, 3, 4, 5, 6].map((k) => {
      const angle = Math.PI / 8 + ((k + 1) * Math.PI) / 4
      return { x: 300 * Math.cos(angle), y: 300 * Math.sin(angle) }
    })
    const found = createNeighbourhood([...crowd, ...lonely]).around({ x: 0, y: 0 }, { perOctant: 2, max: 56 })
    expect(found.filter((i) => i >= 200)).toHaveLength(7)
    expect(found).toHaveLength(56)
  })

  it('leaves out what it is told to', () => {
    const points = Array.from({ length: 30 }, (_, i) => ({ x: i, y: 0 }))
    const found = createNeighbourhood(points).around({ x: 0, y: 0 }, { perOctant: 5, max: 8, keep: (i) => i % 2 === 1 })
    expect(found).toEqual([1, 3, 5, 7, 9, 11, 13, 15])
  })

  it('gives what there is when fewer are left than asked for', () => {
    const points = [{ x: 0, y: 0 }, { x: 5, y: 5 }] // prettier-ignore
    expect(createNeighbourhood(points).nearest({ x: 4, y: 4 }, 10)).toEqual([1, 0])
    expect(createNeighbourhood([]).nearest({ x: 4, y: 4 }, 10)).toEqual([])
  })
})
