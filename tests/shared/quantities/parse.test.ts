import { describe, expect, it } from 'vitest'
import { parseNumber } from '#shared/quantities/parse.ts'
import { numberErrorText } from '#shared/words/numbers.ts'

describe('parseNumber', () => {
  it.each([
    ['12', 12],
    ['1.234', 1.234],
    ['1,23', 1.23],
    ['0,234', 0.234],
    [',5', 0.5],
    ['.5', 0.5],
    ['5,', 5],
    ['1.234,5', 1234.5],
    ['1,234.5', 1234.5],
    ['1,234,567', 1234567],
    ['1.234.567', 1234567],
    ['1234,567', 1234.567],
    ['1 234', 1234],
    ['1\u202f234,567', 1234.567],
    ["1'234.5", 1234.5],
    ['-3.2', -3.2],
    ['−3.2', -3.2],
    ['+7', 7],
    ['1e-4', 1e-4],
    ['1,5E-4', 1.5e-4],
    ['1.7×10⁻⁴', 1.7e-4],
    ['1.7 x 10^-4', 1.7e-4],
  ])('reads %j as %d', (text, value) => expect(parseNumber(text)).toEqual({ value }))

  it.each([
    ['1,234', 1.234, 1234],
    ['-12,345', -12.345, -12345],
  ])('refuses %j and names both readings', (text, asDecimal, asThousands) => {
    const parsed = parseNumber(text)
    expect(parsed).toEqual({ error: 'number/ambiguous-separator', params: { text, asDecimal, asThousands } })
  })

  it.each(['', '  ', '\t'])('calls %j empty', (text) =>
    expect(parseNumber(text)).toMatchObject({ error: 'number/empty' }),
  )

  it.each([
    'abc',
    '12m',
    '1e999',
    '0x10',
    '1..2',
    '.',
    '-',
    '12,345,67',
    '1 23',
    '1.2.3',
    'NaN',
    'Infinity',
    '1e',
    '--1',
  ])('does not take %j for a number', (text) =>
    expect(parseNumber(text)).toEqual({ error: 'number/not-a-number', params: { text } }),
  )
})

describe('numberErrorText', () => {
  it('names both readings of an ambiguous comma and how to write each', () => {
    const parsed = parseNumber('1,234')
    const text = 'error' in parsed ? numberErrorText(parsed.error, parsed.params) : ''
    expect(text).toContain('1.234')
    expect(text).toContain('1234')
  })
})
