/** Refusals of solutions that look at the wells' screens; sentences in shared/words/leakage-findings.ts. */
export type PenetrationErrorCode =
  'analysis/penetration-thickness' | 'analysis/penetration-screens' | 'analysis/screen-outside'
