import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { thinLogarithmically } from '#shared/numerics/logarithmic-thinning.ts'

const minutes = Array.from({ length: 4320 }, (_, i) => 60 * (i + 1))

describe('logarithmic thinning', () => {
  it('keeps a 72 h one-minute log to at most so many per factor of ten', () => {
    const kept = thinLogarithmically(minutes, 20)
    const perCycle = new Map<number, number>()
    for (const i of kept.slice(0, -1)) {
      const cycle = Math.floor(Math.log10(minutes[i] as number))
      perCycle.set(cycle, (perCycle.get(cycle) ?? 0) + 1)
    }
    expect(Math.max(...perCycle.values())).toBeLessThanOrEqual(20)
    expect(kept.length).toBeGreaterThan(40)
  })

  it('keeps everything when nothing is asked, and the first and the last always', () => {
    expect(thinLogarithmically(minutes, null)).toHaveLength(4320)
    fc.assert(
      fc.property(fc.array(fc.double({ min: 0.1, max: 1e6, noNaN: true }), { minLength: 1 }), (values) => {
        const kept = thinLogarithmically(
          values.sort((a, b) => a - b),
          5,
        )
        expect(kept[0]).toBe(0)
        expect(kept.at(-1)).toBe(values.length - 1)
        expect(new Set(kept).size).toBe(kept.length)
      }),
    )
  })

  it('keeps nothing of nothing and refuses a number that is not positive', () => {
    expect(thinLogarithmically([], 10)).toEqual([])
    expect(() => thinLogarithmically([1, 2], 0)).toThrow(RangeError)
  })
})
