import { mdiAlertOctagon, mdiAlertRhombus, mdiCheckCircle, mdiInformation } from '@mdi/js'

export type Severity = 'good' | 'note' | 'caution' | 'error'

/** Each severity has a word, a shape and a colour, so that no meaning hangs on colour alone. */
export const severities: Record<Severity, { word: string; shape: string; colour: string }> = {
  good: { word: 'Good', shape: mdiCheckCircle, colour: 'success' },
  note: { word: 'Note', shape: mdiInformation, colour: 'primary' },
  caution: { word: 'Caution', shape: mdiAlertRhombus, colour: 'warning' },
  error: { word: 'Problem', shape: mdiAlertOctagon, colour: 'error' },
}
