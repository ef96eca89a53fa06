import { describe, expect, it } from 'vitest'
import { largestTriangles } from '#shared/numerics/largest-triangle.ts'

const indices = (count: number) => Array.from({ length: count }, (_, i) => i)

describe('points that stand for a long series', () => {
  it('are those that a hand calculation gives', () => {
    // Two buckets between 0 and 6: {1, 2} and {3, 4, 5}. From (0, 0) to the mean (4, 2) of the second, twice the areas are
    // |2x − 4y|: 14 at (1, 4), 0 at (2, 1). From (1, 4) to the last (6, 0), |4(x − 1) + 5(y − 4)|: 7, 2 and 11.
    expect(largestTriangles(indices(7), [0, 4, 1, 1, 2, 3, 0], 2)).toEqual([0, 1, 5, 6])
  })

  it('hold every lone spike and step of 300,000 readings, and both ends', () => {
    const xs = indices(300_000)
    const ys = xs.map((i) => (i === 123_457 ? 50 : i < 200_000 ? 0 : 1))
    const kept = largestTriangles(xs, ys, 1_000)
    expect(kept.length).toBeLessThanOrEqual(1_002)
    expect(kept).toContain(123_457)
    expect([kept[0], kept.at(-1)]).toEqual([0, 299_999])
    expect(kept.every((at, k) => k === 0 || at > kept[k - 1]!)).toBe(true)
  })

  it('are all of them where each bucket holds one, and crowd no logarithmic axis', () => {
    const times = indices(100_000).map((i) => Math.log10(i + 1))
    const kept = largestTriangles(times, times, 500)
    // The first ten readings lie a tenth of a factor of ten apart and more, buckets a hundredth.
    expect(kept.slice(0, 10)).toEqual(indices(10))
    expect(kept.filter((i) => i >= 10_000).length).toBeLessThanOrEqual(102)
    expect(largestTriangles([1, 2], [3, 4], 5)).toEqual([0, 1])
  })

  it('are refused for no bucket', () => {
    expect(() => largestTriangles([1, 2, 3], [1, 2, 3], 0)).toThrow(RangeError)
  })
})
