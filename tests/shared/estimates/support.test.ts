import { describe, expect, it } from 'vitest'
import type { Note, NoteCode, Severity } from '#shared/estimates/note-types.ts'
import { NOTE_RULES } from '#shared/estimates/notes.ts'
import { SUPPORT_TABLE, supportOf } from '#shared/estimates/support.ts'

const note = (code: NoteCode): Note => {
  const severity = NOTE_RULES.find((rule) => rule.code === code)!.severity
  return { code, severity, params: {} } as Note
}
const support = (...codes: NoteCode[]) => supportOf(codes.map(note))

describe('support', () => {
  it('is well when there is nothing to say, or only good things and notes', () => {
    expect(support().support).toBe('well')
    expect(support('values-near', 'surrounded', 'edge-near', 'old-tests').support).toBe('well')
  })

  it('stays well with one caution that does not touch the number', () => {
    expect(support('values-near', 'stream-close')).toEqual({ support: 'well', because: [] })
  })

  it('is partly with two such cautions, or one that touches the number', () => {
    expect(support('stream-close', 'depth-outside-screens').support).toBe('partly')
    expect(support('outside-hull')).toEqual({ support: 'partly', because: ['outside-hull'] })
  })

  it('is weakly with any bad note, with the mean of the unit only, or with four cautions', () => {
    expect(support('beyond-range', 'evidence-firm')).toEqual({ support: 'weakly', because: ['beyond-range'] })
    expect(support('unit-mean-only').support).toBe('weakly')
    expect(support('one-cluster').support).toBe('weakly')
    expect(support('stream-close', 'outside-hull', 'interval-wide', 'evidence-slight').support).toBe('weakly')
  })

  it('is none outside the unit and with too few values, whatever else is said', () => {
    expect(support('outside-unit', 'beyond-range').support).toBe('none')
    expect(support('too-few-values')).toEqual({ support: 'none', because: ['too-few-values'] })
  })

  it('names in its table only codes that can be made with the severity asked for', () => {
    for (const row of SUPPORT_TABLE) {
      for (const code of row.codes ?? []) {
        const severity: Severity = NOTE_RULES.find((rule) => rule.code === code)!.severity
        expect(row.severities).toContain(severity)
      }
    }
  })
})
