import { AnalysisError } from './analysis-error.ts'
import type { Finding } from './analysis.ts'
import type { Unknown } from './method.ts'

/** Values of all unknowns of a curve method, by their id, as somebody laid its curve over the readings. */
export type CurveMatch = Record<string, number>

/**
 * How a curve moves on logarithmic axes without changing its shape: s = Q/(4πT)·W(r²S/(4Tt), …), so that T moves it
 * along drawdown, and T over the storages along time.
 */
export interface CurveShift {
  /** Ids of the unknowns that a move along time multiplies alike. */
  storages: readonly string[]
}

interface Laid {
  unknowns: readonly Unknown[]
  shift?: CurveShift
}

/** The match after its curve was moved: times of the curve multiplied by one factor, drawdowns by another. */
export function shiftedMatch(
  match: CurveMatch,
  { storages }: CurveShift,
  { time, drawdown }: { time: number; drawdown: number },
): CurveMatch {
  const moved = storages.map((id) => [id, ((match[id] as number) * time) / drawdown] as const)
  return { ...match, ...Object.fromEntries(moved), T: (match.T as number) / drawdown }
}

/**
 * Parameters in the order of the unknowns.
 * @throws AnalysisError for a solution whose curve cannot be moved, or a value that is missing or outside what a search
 * may find
 */
export function laidParameters(match: CurveMatch, { unknowns, shift }: Laid): number[] {
  if (!shift) throw new AnalysisError('analysis/bad-option', { option: 'match' })
  return unknowns.map(({ id, low, high }) => {
    const value = match[id]
    if (value === undefined) throw new AnalysisError('analysis/match-incomplete', { parameter: id })
    if (!(value >= low && value <= high)) throw new AnalysisError('analysis/match-outside', { parameter: id })
    return value
  })
}

export const handCurveFinding: Finding = { code: 'hand-curve', severity: 'note', params: {} }
