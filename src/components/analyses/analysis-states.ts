import type { Analysis } from '#shared/contracts/analyses.ts'
import type { Severity } from '../base/severities.ts'

export const analysisStates: Record<Analysis['state'] | 'unsaved', { word: string; severity: Severity }> = {
  unsaved: { word: 'Not saved', severity: 'caution' },
  draft: { word: 'Draft', severity: 'note' },
  submitted: { word: 'Waits for review', severity: 'note' },
  accepted: { word: 'Accepted', severity: 'good' },
  returned: { word: 'Returned', severity: 'error' },
  withdrawn: { word: 'Withdrawn', severity: 'caution' },
}
