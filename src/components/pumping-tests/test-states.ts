import type { PumpingTestSummary } from '#shared/contracts/pumping-tests.ts'
import type { Severity } from '../base/severities.ts'

export const testStates: Record<PumpingTestSummary['state'], { word: string; severity: Severity }> = {
  'no-readings': { word: 'No readings', severity: 'caution' },
  open: { word: 'Open', severity: 'note' },
  submitted: { word: 'Waits for review', severity: 'note' },
  returned: { word: 'Returned', severity: 'error' },
  accepted: { word: 'Accepted', severity: 'good' },
}
