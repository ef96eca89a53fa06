import type { Finding } from '../analysis.ts'
import type { CorrectionKind } from './kinds.ts'

/** What a regression found of one term: its coefficients with their covariance, and how much it explains. */
export interface Learned {
  coefficients: number[]
  covariance: number[][]
  lag_s: number
  explained: number
}

/** One correction as the regression sees it. */
export interface Term {
  kind: CorrectionKind
  /** Coefficients that were given; null: learned from the readings before pumping. */
  given: number[] | null
  /** Fewest moments before pumping that learning it takes. */
  needed: number
  /** Lags tried; a single one where none is searched. */
  lags_s: number[]
  /** Columns by which it explains drawdown, at times and for a lag. */
  columns(times: readonly number[], lag_s: number): number[][]
  /** Columns that stay in the regression when what the term explains is judged. */
  remaining?(times: readonly number[]): number[][]
  /** Figures for the record. */
  record(learned: Learned): Record<string, number>
  findings(learned: Learned): Finding[]
}
