import type { KindErrorCode } from './kind-errors.ts'
import type { PenetrationErrorCode } from './penetration-errors.ts'
import type { StorageErrorCode } from './storage-errors.ts'

export type AnalysisErrorCode =
  | KindErrorCode
  | PenetrationErrorCode
  | StorageErrorCode
  | 'analysis/unknown-method'
  | 'analysis/no-wells'
  | 'analysis/unknown-well'
  | 'analysis/wrong-wells'
  | 'analysis/too-few-wells'
  | 'analysis/uneven-series'
  | 'analysis/no-rate'
  | 'analysis/bad-rate'
  | 'analysis/negative-rate'
  | 'analysis/rates-out-of-order'
  | 'analysis/bad-option'
  | 'analysis/zero-distance'
  | 'analysis/distances-equal'
  | 'analysis/too-few-readings'
  | 'analysis/times-equal'
  | 'analysis/slope-not-positive'
  | 'analysis/no-drawdown'
  | 'analysis/no-recovery'
  | 'analysis/no-common-time'
  | 'analysis/no-thickness'
  | 'analysis/not-unconfined'
  | 'analysis/thinning-too-large'
  | 'analysis/thinning-early'
  | 'analysis/no-fit'
  | 'analysis/match-incomplete'
  | 'analysis/match-outside'
  | 'analysis/boundaries-too-many'
  | 'analysis/boundaries-behind'
  | 'analysis/boundaries-facing'
  | 'analysis/boundaries-angle'
  | 'analysis/boundary-place'
  | 'analysis/bearing-unknown'
  | 'analysis/other-well-distance'
  | 'analysis/other-well-behind'
  | 'analysis/other-wells-boundary'

/** Inputs a method refuses, as a code and parameters; the sentence is in shared/words/findings.ts. */
export class AnalysisError extends Error {
  readonly code: AnalysisErrorCode
  readonly params: Record<string, number | string>

  constructor(code: AnalysisErrorCode, params: Record<string, number | string> = {}) {
    super(`${code} ${JSON.stringify(params)}`)
    this.name = 'AnalysisError'
    this.code = code
    this.params = params
  }
}
