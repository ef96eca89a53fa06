import { emptyChecklist, isRecorded, type TestChecklist } from '#shared/contracts/test-checklist.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'
import { asksDisposalDistance, asksTrendTime, checklistLines } from '#shared/words/test-checklist.ts'

/** The checklist of a saved test, to be changed. */
export const checklistFormOf = (checklist: TestChecklist | null): TestChecklist =>
  checklist ? { ...checklist } : emptyChecklist()

/** What is sent: nothing where nothing was recorded; a time or distance only with the answer it belongs to. */
export function checklistOf(form: TestChecklist): TestChecklist | null {
  if (!isRecorded(form)) return null
  return {
    ...form,
    trendWatchedS: asksTrendTime(form) ? form.trendWatchedS : null,
    disposalDistanceM: asksDisposalDistance(form) ? form.disposalDistanceM : null,
  }
}

/** One line for telling two versions of a checklist apart. */
export const checklistText = (form: TestChecklist, units: UnitSystem): string =>
  checklistLines(form, units)
    .filter(({ recorded }) => recorded)
    .map(({ label, text }) => `${label}: ${text.toLowerCase()}`)
    .join('; ') || '–'
