import { describe, expect, it } from 'vitest'
import type { Note, NoteCode, NoteParams } from '#shared/estimates/note-types.ts'
import { NOTE_RULES } from '#shared/estimates/notes.ts'
import { unitSystemById } from '#shared/quantities/systems.ts'
import { distanceText } from '#shared/words/distances.ts'
import { exclusionText, noteText, supportLabel } from '#shared/words/notes.ts'

const metric = unitSystemById('metric')
const us = unitSystemById('us')
const near = { within: 14, firm: 8, range_m: 4100, nearest_m: 900, bearing_deg: 45 }

const EXAMPLES: { [C in NoteCode]: NoteParams[C] } = {
  'outside-unit': { unit: 'Tarrow Gravels', distance_m: 320 },
  'too-few-values': { n: 3, sites: 1 },
  'values-near': near,
  'values-some': near,
  'nearest-far': near,
  'beyond-range': near,
  'unit-mean-only': { n: 14, sites: 8 },
  'one-cluster': { extent_m: 2400 },
  'evidence-firm': { share: 0.734 },
  'evidence-mixed': { firm: 3, fair: 8, slight: 2 },
  'evidence-slight': { share: 0.66 },
  surrounded: { n: 24 },
  'outside-hull': { distance_m: 1234 },
  'edge-near': { distance_m: 300, unit: 'Tarrow Gravels' },
  'coast-near': { distance_m: 800 },
  'barrier-between': { hidden: 1, nearest_m: 640 },
  'neighbours-agree': { n: 8, deviation: 0.1 },
  'neighbours-disagree': { n: 8, deviation: 0.6 },
  'interval-narrow': { factor: 4.04 },
  'interval-wide': { factor: 43.7 },
  'interval-very-wide': { factor: 832 },
  'old-tests': { share: 0.61, years: 30 },
  'one-test-dominates': { label: 'V-0147', weight: 0.71 },
  'variogram-assumed': { from: 'the Brannet Sandstone' },
  'variogram-poor': { nuggetShare: 0.82 },
  'errors-exceed-scatter': {},
  'coverage-holds': { inside: 94, n: 100, share: 0.94 },
  'coverage-count': { inside: 11, n: 12, share: 11 / 12 },
  'coverage-fails': { inside: 80, n: 100, share: 0.8 },
  'spread-rescaled': { factor: 1.42 },
  'unit-by-outline': { unit: 'Tarrow Gravels' },
  'position-poor': { label: 'V-0092', accuracy_m: 250, distance_m: 400 },
  'depth-outside-screens': { depth_m: 80, top_m: 10, bottom_m: 30 },
  'composite-values': { share: 0.4 },
  'slug-scale': { share: 0.35 },
  'stream-close': { stream: 'Tarrow', distance_m: 410 },
  'second-opinion-differs': { ratio: 2.6 },
  'values-left-out': { count: 2 },
  'model-outdated': {},
}

const noteOf = (code: NoteCode): Note =>
  ({ code, severity: NOTE_RULES.find((rule) => rule.code === code)!.severity, params: EXAMPLES[code] }) as Note

describe('sentences of confidence notes', () => {
  it.each(NOTE_RULES.map((rule) => rule.code))('says %s in one plain paragraph', (code) => {
    const text = noteText(noteOf(code), metric)
    expect(text).toMatch(/^[A-Z0-9].*\.$/)
    expect(text).not.toMatch(/undefined|NaN|null|!|\[object/)
  })

  it('gives tests, range, distance and direction', () => {
    expect(noteText(noteOf('values-near'), metric)).toBe(
      '14 tests within the 4.1 km range, nearest 900 m NE; 8 of them firm.',
    )
  })

  it('speaks feet to a reader of feet', () => {
    // 410 m / 0.3048 = 1345 ft
    expect(noteText(noteOf('stream-close'), us)).toContain('1\u202f300 ft away')
  })

  it('gives depths to three figures', () => {
    const deep = {
      code: 'depth-outside-screens',
      severity: 'caution',
      params: { depth_m: 123, top_m: 10.5, bottom_m: 30 },
    }
    expect(noteText(deep as Note, metric)).toBe('A depth of 123 m lies outside the tested screens (10.5 m to 30 m).')
  })

  it('counts one test as one', () => {
    expect(noteText(noteOf('barrier-between'), metric)).toBe(
      '1 test, the nearest 640 m away, lies beyond a mapped barrier and is not used.',
    )
  })

  it('tells widening from narrowing', () => {
    const narrowed = { code: 'spread-rescaled', severity: 'note', params: { factor: 0.9 } } as const
    expect(noteText(narrowed, metric)).toContain('narrowed to 90 %')
    expect(noteText(noteOf('spread-rescaled'), metric)).toContain('widened by a factor of 1.4')
  })

  it('name the support and the reasons for leaving a value out', () => {
    expect(supportLabel('partly')).toBe('Partly supported')
    expect(exclusionText('storage-origin')).toContain('slug test')
  })
})

describe('distances', () => {
  it.each([
    [0, '0 m'],
    [0.4, '0.4 m'],
    [410, '410 m'],
    [999.6, '1\u202f000 m'],
    [4123, '4.1 km'],
    [41_230, '41 km'],
  ])('%d m reads %s', (metres, text) => {
    expect(distanceText(metres, metric)).toBe(text)
  })
})
