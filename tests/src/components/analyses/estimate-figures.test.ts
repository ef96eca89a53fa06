import { describe, expect, it } from 'vitest'
import { figuresOf, isWritable } from '../../../../src/components/analyses/estimate-figures.ts'

describe('Figures of an estimate', () => {
  it('are fewer the wider its interval', () => {
    expect(figuresOf({ low: 401, high: 415 })).toBe(3)
    expect(figuresOf({ low: 200, high: 900 })).toBe(2)
    expect(figuresOf({ low: 1, high: 400 })).toBe(1)
  })

  it('are one for an interval without end', () => {
    expect(figuresOf({ low: 0, high: 400 })).toBe(1)
    expect(figuresOf({ low: Number.NaN, high: 400 })).toBe(1)
  })

  it('follow the half-width where a quantity may be negative, as skin', () => {
    expect(figuresOf({ low: -1.28, high: -1.18 })).toBe(3)
    expect(figuresOf({ low: -1.7, high: -0.7 })).toBe(2)
    expect(figuresOf({ low: -5, high: 7 })).toBe(1)
    expect(figuresOf({ low: -3, high: 3 })).toBe(1)
  })
})

describe('An interval', () => {
  it('is written unless it says nothing', () => {
    expect([
      isWritable({ low: 1, high: 500 }),
      isWritable({ low: 1e-30, high: 1e30 }),
      isWritable({ low: -1e30, high: 1e30 }),
      isWritable({ low: -3, high: 4 }),
    ]).toEqual([true, false, false, true])
  })
})
