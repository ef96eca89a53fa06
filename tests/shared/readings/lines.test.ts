import { describe, expect, it } from 'vitest'
import { MAX_READINGS_PER_SERIES } from '#shared/readings/limits.ts'
import { cellsOf, linesOf, refuseText } from '#shared/readings/lines.ts'

describe('linesOf', () => {
  it.each(['a\nb\n', 'a\r\nb\r\n', 'a\rb\r', '\ufeffa\nb', 'a\r\nb\n\u001a'])('finds two lines in %j', (text) => {
    expect(linesOf(text)).toEqual(['a', 'b'])
  })

  it('keeps blank lines between and at the end', () => {
    expect(linesOf('a\n\nb\n\n')).toEqual(['a', '', 'b', ''])
  })
})

describe('cellsOf', () => {
  it('takes quotation marks off and keeps delimiters between them', () => {
    expect(cellsOf(['"10:00";"12,5"', '"a;b";2'], ';')).toEqual([
      ['10:00', '12,5'],
      ['a;b', '2'],
    ])
  })

  it('does not let a stray quotation mark swallow the lines below', () => {
    const rows = cellsOf(['t,"Depth', '0,12.5', '1,12.6'], ',')
    expect(rows).toHaveLength(3)
    expect(rows.slice(1)).toEqual([
      ['0', '12.5'],
      ['1', '12.6'],
    ])
  })

  it('takes any run of spaces as one delimiter', () => {
    expect(cellsOf(['  10:00   12.5  ', '10:01\t12.6'], ' ')).toEqual([
      ['10:00', '12.5'],
      ['10:01', '12.6'],
    ])
  })
})

describe('refuseText', () => {
  it.each(['', '  \n \t\n', '\ufeff'])('calls %j empty', (text) => {
    expect(refuseText(text)?.code).toBe('readings/empty-file')
  })

  it('refuses a text with zero bytes', () => {
    expect(refuseText('1;2\n\u0000\u0000')?.code).toBe('readings/not-text')
  })

  it('refuses more lines than a series may have, and takes exactly as many', () => {
    const most = '1;2\n'.repeat(MAX_READINGS_PER_SERIES)
    expect(refuseText(most)).toBeNull()
    expect(refuseText(`${most}1;2`)).toEqual({
      ok: false,
      code: 'readings/too-many-rows',
      params: { lines: MAX_READINGS_PER_SERIES + 1, limit: MAX_READINGS_PER_SERIES },
    })
  })
})
