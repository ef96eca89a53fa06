import { describe, expect, it } from 'vitest'
import { emptyChecklist, isRecorded, testChecklist } from '#shared/contracts/test-checklist.ts'
import { unitSystemById } from '#shared/quantities/systems.ts'
import { checklistAnswers, checklistLines, checklistQuestions } from '#shared/words/test-checklist.ts'

const metric = unitSystemById('metric')
const feet = unitSystemById('us')
const textOf = (lines: ReturnType<typeof checklistLines>, question: string) =>
  lines.find((line) => line.question === question)?.text

describe('the checklist of test conditions', () => {
  it('demands nothing: what is left out is not recorded', () => {
    const empty = testChecklist.parse({ version: 1 })
    expect(isRecorded(empty)).toBe(false)
    expect(isRecorded({ ...empty, rain: 'during' })).toBe(true)
    expect(isRecorded({ ...empty, disposalDistanceM: 0 })).toBe(true)
  })

  it('refuses an answer that is not on the list, another version and a distance below zero', () => {
    for (const wrong of [
      { version: 1, rain: 'sometimes' },
      { version: 2 },
      { version: 1, disposalDistanceM: -1 },
      { version: 1, trendWatchedS: 0 },
    ])
      expect(testChecklist.safeParse(wrong).success).toBe(false)
  })

  it('has a word for every answer of every question', () => {
    for (const question of checklistQuestions('constant-rate'))
      expect(Object.keys(checklistAnswers[question]).sort()).toEqual(
        [...testChecklist.shape[question].unwrap().options].sort(),
      )
  })

  it('says that nothing was recorded where a test has none', () => {
    const lines = checklistLines(null, metric)
    expect(lines).toHaveLength(7)
    expect(new Set(lines.map(({ text }) => text))).toEqual(new Set(['Not recorded']))
  })

  it('says times and distances with the answer they belong to, in the reader’s units', () => {
    const checklist = {
      ...emptyChecklist(),
      staticTrend: 'falling' as const,
      trendWatchedS: 36 * 3600,
      disposal: 'stream' as const,
      disposalDistanceM: 304.8,
    }
    expect(textOf(checklistLines(checklist, metric), 'staticTrend')).toBe('Falling, watched for 36 h')
    expect(textOf(checklistLines(checklist, metric), 'disposal')).toContain('305 m from the pumped well')
    expect(textOf(checklistLines(checklist, feet), 'disposal')).toContain('ft from the pumped well')
    const notWatched = { ...checklist, staticTrend: 'not-watched' as const }
    expect(textOf(checklistLines(notWatched, metric), 'staticTrend')).toBe('Not watched')
  })

  it('asks nothing about pumped water in a slug test', () => {
    expect(checklistQuestions('slug')).not.toContain('disposal')
    expect(checklistQuestions('slug')).not.toContain('dischargeMeasured')
    expect(checklistQuestions('slug')).toContain('tide')
  })
})
