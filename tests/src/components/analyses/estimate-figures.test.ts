import { describe, expect, it } from 'vitest'
import { figuresOf } from '../../../../src/components/analyses/estimate-figures.ts'

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
})
