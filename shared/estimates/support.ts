import type { Note, NoteCode, Severity } from './note-types.ts'
import type { Support } from './types.ts'

/** One row of the table: the support that holds when enough of these notes were made. */
export interface SupportRow {
  support: Support
  /** Only these codes count; null counts every code. */
  codes: readonly NoteCode[] | null
  severities: readonly Severity[]
  /** How many such notes it takes. */
  atLeast: number
}

/** Cautions that touch the number itself, so that one is enough to lower the support. */
const WEIGHTY: readonly NoteCode[] = [
  'nearest-far',
  'outside-hull',
  'evidence-slight',
  'neighbours-disagree',
  'interval-wide',
  'coverage-fails',
  'variogram-assumed',
  'variogram-poor',
  'one-test-dominates',
  'second-opinion-differs',
]

/** Read from the top; the first row that holds gives the support. The reader is shown this table. */
export const SUPPORT_TABLE: readonly SupportRow[] = [
  { support: 'none', codes: ['outside-unit', 'too-few-values'], severities: ['bad'], atLeast: 1 },
  { support: 'weakly', codes: null, severities: ['bad'], atLeast: 1 },
  { support: 'weakly', codes: ['unit-mean-only'], severities: ['caution'], atLeast: 1 },
  { support: 'weakly', codes: null, severities: ['caution'], atLeast: 4 },
  { support: 'partly', codes: WEIGHTY, severities: ['caution'], atLeast: 1 },
  { support: 'partly', codes: null, severities: ['caution'], atLeast: 2 },
  { support: 'well', codes: null, severities: ['good', 'note', 'caution', 'bad'], atLeast: 0 },
]

/** How well an estimate is grounded, and the notes that decided it (none when well supported). */
export function supportOf(notes: readonly Note[]): { support: Support; because: NoteCode[] } {
  for (const { support, codes, severities, atLeast } of SUPPORT_TABLE) {
    const counted = notes.filter((n) => severities.includes(n.severity) && (codes === null || codes.includes(n.code)))
    if (counted.length >= atLeast) return { support, because: support === 'well' ? [] : counted.map((n) => n.code) }
  }
  return { support: 'well', because: [] }
}
