import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { sampleLogarithmically, thinLogarithmically } from '#shared/numerics/logarithmic-thinning.ts'

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

describe('a logarithmic sample', () => {
  it('has at most so many values, the first and the last among them, in order', () => {
    const ascending = fc
      .array(fc.double({ min: 0.1, max: 1e6, noNaN: true }), { minLength: 1, maxLength: 300 })
      .map((values) => values.sort((a, b) => a - b))
    fc.assert(
      fc.property(ascending, fc.integer({ min: 2, max: 60 }), (values, most) => {
        const kept = sampleLogarithmically(values, most)
        expect(kept.length).toBeLessThanOrEqual(most)
        expect([kept[0], kept.at(-1)]).toEqual([0, values.length - 1])
        expect(kept).toEqual([...new Set(kept)].sort((a, b) => a - b))
      }),
    )
  })

  it('is all of few values, and uses its room where early values are sparse', () => {
    expect(sampleLogarithmically([1, 2, 3], 5)).toEqual([0, 1, 2])
    expect(sampleLogarithmically(minutes, 400).length).toBeGreaterThan(360)
  })

  it('is even: the steps between its late values are alike', () => {
    const times = sampleLogarithmically(minutes, 100).map((i) => Math.log(minutes[i]!))
    const steps = times.slice(-40).map((time, k, late) => time - (late[k - 1] ?? Number.NaN))
    const [least, most] = [Math.min(...steps.slice(1, -1)), Math.max(...steps.slice(1, -1))]
    expect(most / least).toBeLessThan(1.5)
  })

  it('cannot be of a single value', () => {
    expect(() => sampleLogarithmically([1, 2, 3], 1)).toThrow(RangeError)
  })
})
