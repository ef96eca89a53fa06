import { describe, expect, it } from 'vitest'
import { noteGroups, severityOf } from '../../../../src/components/estimates/note-groups.ts'

const note = (code: string, severity: 'good' | 'note' | 'caution' | 'bad') => ({ code, severity, params: {} })

describe('confidence notes', () => {
  const notes = [
    note('surrounded', 'good'),
    note('stream-close', 'note'),
    note('interval-wide', 'caution'),
    note('coast-near', 'caution'),
    note('beyond-range', 'bad'),
  ]

  it('begin with what decided the support, the worst first', () => {
    const groups = noteGroups({ notes, support: 'weakly', supportBecause: ['interval-wide', 'beyond-range'] })
    expect(groups.map(({ title, notes: members }) => [title, members.map(({ code }) => code)])).toEqual([
      ['Why it is weakly supported', ['beyond-range', 'interval-wide']],
      ['Also to mind', ['coast-near', 'stream-close']],
      ['In its favour', ['surrounded']],
    ])
  })

  it('leave out groups that nothing belongs to', () => {
    const groups = noteGroups({ notes: [note('surrounded', 'good')], support: 'well', supportBecause: [] })
    expect(groups.map(({ title }) => title)).toEqual(['In its favour'])
    expect(noteGroups({ notes: [], support: 'well', supportBecause: [] })).toEqual([])
  })

  it('are all there, each once', () => {
    const groups = noteGroups({ notes, support: 'partly', supportBecause: ['interval-wide'] })
    expect(groups.flatMap(({ notes: members }) => members.map(({ code }) => code)).sort()).toEqual(
      notes.map(({ code }) => code).sort(),
    )
  })

  it('have a mark for every severity', () => {
    expect((['good', 'note', 'caution', 'bad'] as const).map((severity) => severityOf({ severity }))).toEqual([
      'good',
      'note',
      'caution',
      'error',
    ])
  })
})
