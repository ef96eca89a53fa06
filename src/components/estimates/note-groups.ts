import type { Estimate } from '#shared/contracts/estimates.ts'
import type { Note } from '#shared/estimates/note-types.ts'
import type { Severity } from '../base/severities.ts'

type Told = Estimate['notes'][number]

export interface NoteGroup {
  title: string
  notes: Note[]
}

const because: Record<Estimate['support'], string> = {
  none: 'Why there is no estimate',
  weakly: 'Why it is weakly supported',
  partly: 'Why it is only partly supported',
  well: '',
}

/** The worst first. */
const order: Record<Told['severity'], number> = { bad: 0, caution: 1, note: 2, good: 3 }

export const severityOf = ({ severity }: Pick<Told, 'severity'>): Severity => (severity === 'bad' ? 'error' : severity)

/** Confidence notes as they are read: what decided the support, what else to mind, what speaks for the estimate. */
export function noteGroups({ notes, support, supportBecause }: Pick<Estimate, 'notes' | 'support' | 'supportBecause'>) {
  const sorted = [...notes].sort((a, b) => order[a.severity] - order[b.severity])
  const decided = ({ code }: Told) => supportBecause.includes(code)
  const groups = [
    { title: because[support], notes: sorted.filter(decided) },
    { title: 'Also to mind', notes: sorted.filter((note) => !decided(note) && note.severity !== 'good') },
    { title: 'In its favour', notes: sorted.filter((note) => !decided(note) && note.severity === 'good') },
  ]
  // The contract carries code and parameters apart; the server wrote them together.
  return groups.filter(({ notes: members }) => members.length > 0) as unknown as NoteGroup[]
}
