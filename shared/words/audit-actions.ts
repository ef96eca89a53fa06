import type { AuditAction } from '#shared/contracts/audit-trail.ts'

/** What somebody did, as a phrase that follows their name. */
export const auditActionWords: Record<AuditAction, string> = {
  'adopted-values/withdraw': 'Withdrew a value from the regional table',
  'analyses/create': 'Saved a new analysis',
  'analyses/delete': 'Deleted a draft of an analysis',
  'analyses/edit': 'Changed a draft of an analysis',
  'analyses/report': 'Entered a reported value',
  'analyses/submit': 'Submitted an analysis for review',
  'analyses/take-back': 'Took back an analysis that waited for review',
  'aquifer-units/create': 'Entered an aquifer unit',
  'boundaries/create': 'Entered a boundary',
  'corrections/create': 'Entered a correction of readings',
  'corrections/edit': 'Changed a correction of readings',
  'corrections/delete': 'Removed a correction of readings',
  'jobs/cancel': 'Cancelled a job',
  'other-wells/create': 'Entered another well that pumped',
  'other-wells/edit': 'Changed another well that pumped',
  'other-wells/delete': 'Removed another well that pumped',
  'outside-series/add': 'Uploaded a series that readings are corrected by',
  'outside-series/delete': 'Deleted a series that readings are corrected by',
  'outside-series/replace': 'Replaced a series that readings are corrected by',
  'password/change': 'Changed their own password',
  'password/set': 'Set a password by a mailed link',
  'people/edit': 'Changed a person’s name or rights',
  'people/invite': 'Invited a person',
  'people/invite-again': 'Sent an invitation again',
  'pumping-tests/create': 'Entered a pumping test',
  'pumping-tests/delete': 'Took out a test of which only values were known',
  'pumping-tests/edit': 'Changed a pumping test',
  'pumping-tests/report': 'Entered a test of which only values are known',
  'readings/add': 'Uploaded a log of readings',
  'readings/decide': 'Left readings out, or took them back',
  'readings/delete': 'Deleted a log of readings',
  'region/edit': 'Changed the region’s settings',
  'reviews/accept': 'Accepted an analysis',
  'reviews/return': 'Returned an analysis to its author',
  'streams/create': 'Entered a stream',
  'visibility/edit': 'Changed who can see a record',
  'visibility/lift-embargo': 'Ended an embargo whose day had come',
  'wells/create': 'Entered a well',
  'wells/edit': 'Changed a well',
}

/** An action that another version of the program recorded has no words here: its code stands for itself. */
export const auditActionText = (action: string): string =>
  Object.hasOwn(auditActionWords, action) ? auditActionWords[action as AuditAction] : action
