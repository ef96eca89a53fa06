import { describe, expect, it } from 'vitest'
import { decimalsOf, readNumber } from '#shared/readings/numbers.ts'

describe('readNumber', () => {
  it.each([
    ['12.5', '.', 12.5],
    ['-0.25', '.', -0.25],
    ['1e-3', '.', 0.001],
    ['12,5', ',', 12.5],
    ['1,234', ',', 1.234],
    ['1.234,5', ',', 1234.5],
    ['1,234.5', '.', 1234.5],
    ['1 234.5', '.', 1234.5],
    ['−3.2', '.', -3.2],
    ['7', ',', 7],
  ] as const)('reads %s under the mark %s', (text, mark, value) => {
    expect(readNumber(text, mark)).toEqual({ value, otherMark: false })
  })

  it.each([
    ['12,5', '.', 12.5],
    ['12.5', ',', 12.5],
    ['0.123', ',', 0.123],
  ] as const)('accepts %s under the mark %s and says that the mark is another', (text, mark, value) => {
    expect(readNumber(text, mark)).toEqual({ value, otherMark: true })
  })

  it.each([
    ['1,234', '.'],
    ['1.234', ','],
  ] as const)('refuses to guess what %s means under the mark %s', (text, mark) => {
    expect(readNumber(text, mark)).toEqual({ error: 'ambiguous', asDecimal: 1.234, asThousands: 1234 })
  })

  it.each(['', 'NaN', 'n/a', '---', '#N/A', 'null'])('knows %j as no value', (text) => {
    expect(readNumber(text, '.')).toEqual({ error: 'missing' })
  })

  it.each(['dry', '12.5 m', '>12', '1.2.3', '1e400', '12:30'])('cannot read %j', (text) => {
    expect(readNumber(text, '.')).toEqual({ error: 'unreadable' })
  })
})

describe('decimalsOf', () => {
  it.each([
    ['12', 0],
    ['12.50', 2],
    ['12,345', 3],
    ['1.5e-3', 4],
    ['1.5e3', 0],
  ])('counts the decimals of %s', (text, decimals) => expect(decimalsOf(text)).toBe(decimals))
})
