import type { Person } from '#shared/contracts/people.ts'
import type { Severity } from '../base/severities.ts'

export const personStates: Record<Person['state'], { word: string; severity: Severity }> = {
  active: { word: 'Active', severity: 'good' },
  invited: { word: 'Invited', severity: 'note' },
  deactivated: { word: 'Deactivated', severity: 'caution' },
}
