import type { Finding } from '../analysis.ts'
import type { CorrectionKind } from './kinds.ts'

/** Readings of one well as drawdown, on the clock on which pumping begins at zero. */
export interface Readings {
  elapsed_s: readonly number[]
  drawdown_m: readonly number[]
  /** Left out: all of them. What is not included teaches nothing and need not be covered. */
  included?: readonly boolean[]
}

/** A series from elsewhere, on the same clock: air pressure as metres of water, the stage of a river or of the sea. */
export interface Outside {
  elapsed_s: readonly number[]
  value_m: readonly number[]
}

/** How a level follows an outside series: given, or learned from the readings before pumping. */
export type Efficiency =
  | { given: number; lag_s: number }
  | {
      /** Longest lag tried, and the step between lags; a longest of 0 tries none. */
      longestLag_s: number
      lagStep_s: number
    }

/** What one correction did. */
export interface Correction {
  kind: CorrectionKind
  /** Its figures were given; otherwise they were learned from the readings before pumping. */
  given: boolean
  /** What was taken off each reading. */
  effect_m: number[]
  /** Figures of the correction by name, in SI, for the record. */
  record: Record<string, number>
  findings: Finding[]
}

/** A correction as it is kept with the readings that it was applied to. */
export interface AppliedCorrection extends Omit<Correction, 'effect_m'> {
  /** Name of the series that caused it; null where there is none. */
  outside: string | null
}

/** Readings after all corrections. Raw readings stay: drawdown = corrected + shift + the sum of all effects. */
export interface Corrected {
  drawdown_m: number[]
  /** Taken off beside the effects, so that the mean before pumping is zero once more. */
  shift_m: number
  /** In the order in which they were wanted. */
  corrections: Correction[]
}

/** The raw drawdowns again. */
export const undone = ({ drawdown_m, shift_m, corrections }: Corrected): number[] =>
  drawdown_m.map((value, i) =>
    corrections.reduce((sum, { effect_m }) => sum + (effect_m[i] as number), value + shift_m),
  )
