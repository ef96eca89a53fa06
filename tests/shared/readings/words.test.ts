import { describe, expect, it } from 'vitest'
import { unitSystemById } from '#shared/quantities/systems.ts'
import {
  drawdownCodes,
  flagCodes,
  questionCodes,
  reasonCodes,
  refusalCodes,
  rowErrorCodes,
} from '#shared/readings/codes.ts'
import { inspectLog } from '#shared/readings/inspect.ts'
import { readLog } from '#shared/readings/read.ts'
import { readingIssueText } from '#shared/words/readings.ts'
import { makeContext, makeMapping, taken } from './make.ts'

const params = {
  row: 8,
  text: '1,234',
  kind: 'PDF',
  lines: 400_000,
  limit: 300_000,
  column: 2,
  name: 'Depth',
  readings: 'a or b',
  zone: 'Europe/Paris',
  value_m: 12.5,
  median_m: 12.1,
  elapsed_s: 600,
  earlier: 7,
  by_s: 60,
  gap_s: 3600,
  usual_s: 60,
  found: 1,
  needed: 2,
  order: 'dmy',
  asDecimal: 1.234,
  asThousands: 1234,
  antecedent_s: 120,
  test_s: 600,
}
const allCodes = [...refusalCodes, ...flagCodes, ...rowErrorCodes, ...questionCodes, ...reasonCodes, ...drawdownCodes]

describe('readingIssueText', () => {
  it.each(allCodes)('makes whole sentences of %s', (code) => {
    const text = readingIssueText(code, params)
    expect(text).toMatch(/^Row 8(?:: | )[^ ].*[.?]$/)
    expect(text).not.toMatch(/undefined|NaN|!|""/)
  })

  it('names row, field and remedy of a row that was not taken', () => {
    const { issues } = taken(readLog('0;12.3\n1;dry\n2;12.5\n', makeMapping(), makeContext()))
    const [issue] = issues
    expect(issue && readingIssueText(issue.code, { row: issue.row, ...issue.params })).toBe(
      'Row 2: the value "dry" is not a number. Write the number alone, without unit or remark.',
    )
  })

  it('says lengths in the unit of the reader', () => {
    const text = readingIssueText('readings/spike', { row: 3, value_m: 3.048, median_m: 6.096 }, unitSystemById('us'))
    expect(text).toContain('10 ft')
    expect(text).toContain('20 ft')
  })

  it('says what is wrong with a whole file without naming a row', () => {
    const refused = inspectLog('name,remark\nT-7,dry\n')
    expect(!refused.ok && readingIssueText(refused.code, refused.params)).toMatch(/^No column of numbers was found\./)
  })
})
