import { AnalysisError } from '../analysis-error.ts'
import { lengthFindings, type Antecedent } from './antecedent.ts'
import type { Term } from './term.ts'

const sdAt = (covariance: number[][], i: number) => Math.sqrt(Math.max(0, covariance[i]?.[i] ?? 0))
const ones = (times: readonly number[]) => times.map(() => 1)

/**
 * The linear trend of the readings before pumping, carried through the test: level and slope learned, or a slope that is
 * given and counts from the start of pumping.
 * @param slope_m_s rise of drawdown; null: learned
 * @throws AnalysisError for a slope that is no number
 * Source: common practice; Kruseman & de Ridder, ILRI 47, from memory.
 */
export function trendTerm(before: Antecedent, slope_m_s: number | null): Term {
  if (slope_m_s !== null && !Number.isFinite(slope_m_s)) {
    throw new AnalysisError('analysis/bad-option', { option: 'trend' })
  }
  return {
    kind: 'trend',
    given: slope_m_s === null ? null : [0, slope_m_s],
    needed: 3,
    lags_s: [0],
    columns: (times) => [ones(times), [...times]],
    remaining: (times) => [ones(times)],
    record: ({ coefficients: [start_m = 0, slope = 0], covariance }) => ({
      start_m,
      slope_m_s: slope,
      ...(slope_m_s === null ? { slopeSd_m_s: sdAt(covariance, 1) } : {}),
    }),
    findings: () => (slope_m_s === null ? lengthFindings(before) : []),
  }
}
