import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatDecimals, formatInterval, formatNumber, formatQuantity } from '#shared/quantities/format.ts'
import { parseNumber } from '#shared/quantities/parse.ts'
import { toSI } from '#shared/quantities/units.ts'

const thousands = '\u202f'

describe('formatNumber', () => {
  it.each([
    [640, '640'],
    [1234.4, `1${thousands}230`],
    [123456, `123${thousands}000`],
    [999.9, `1${thousands}000`],
    [0.0123, '0.0123'],
    [0.001, '0.00100'],
    [0.00099996, '0.00100'],
    [1.7e-4, '1.70×10⁻⁴'],
    [9.999e8, '1.00×10⁹'],
    [-5.25, '−5.25'],
    [0, '0'],
    [-0, '0'],
    [NaN, '–'],
    [-Infinity, '−∞'],
  ])('shows %d as %s', (value, text) => expect(formatNumber(value)).toBe(text))

  it('shows as many figures as asked and drops zeros only when told', () => {
    expect(formatNumber(2.5, { figures: 5 })).toBe('2.5000')
    expect(formatNumber(2.5, { figures: 5, trim: true })).toBe('2.5')
    expect(formatNumber(2e-7, { trim: true })).toBe('2×10⁻⁷')
    expect(formatNumber(1500, { figures: 2 })).toBe(`1${thousands}500`)
  })

  it('is read back by parseNumber within the figures shown', () => {
    const values = fc.double({ min: -1e15, max: 1e15, noNaN: true }).filter((value) => Math.abs(value) > 1e-200)
    fc.assert(
      fc.property(values, (value) => {
        const parsed = parseNumber(formatNumber(value, { figures: 6 }))
        expect('value' in parsed && Math.abs(parsed.value / value - 1)).toBeLessThanOrEqual(5.001e-6)
      }),
    )
  })
})

describe('formatQuantity and formatInterval', () => {
  it('convert from SI and carry the unit', () => {
    expect(formatQuantity(toSI(640, 'm2/d'), 'm2/d')).toBe('640 m²/d')
    expect(formatQuantity(toSI(100, 'gpm-us'), 'L/s')).toBe('6.31 L/s')
    expect(formatInterval(toSI(450, 'm2/d'), toSI(910, 'm2/d'), 'm2/d')).toBe('450 to 910 m²/d')
  })

  it('show a pure number without a unit', () => {
    expect(formatQuantity(1.7e-4, '1')).toBe('1.70×10⁻⁴')
  })
})

describe('formatDecimals', () => {
  it('keeps the count of decimals, and no sign on a zero', () => {
    expect(formatDecimals(12.34, 3)).toBe('12.340')
    expect(formatDecimals(-1234.5, 1)).toBe(`−1${thousands}234.5`)
    expect(formatDecimals(-0.0004, 3)).toBe('0.000')
    expect(formatDecimals(NaN, 2)).toBe('–')
  })
})

describe('formatElapsed', () => {
  it.each([
    [0.5, '0.5 s'],
    [45, '45 s'],
    [119, '119 s'],
    [120, '2 min'],
    [2400, '40 min'],
    [86400, `1${thousands}440 min`],
    [3 * 86400, '3 d'],
    [3.25 * 86400, '3.25 d'],
    [-600, '−10 min'],
  ])('shows %d seconds as %s', (seconds, text) => expect(formatElapsed(seconds)).toBe(text))
})
