import { AnalysisError } from '../analysis-error.ts'
import type { Finding } from '../analysis.ts'
import type { Readings } from './correction.ts'

/** Readings of before pumping in order of time, from which corrections learn. */
export interface Antecedent {
  elapsed_s: number[]
  drawdown_m: number[]
  /** Length of the record before pumping, and of the test. */
  antecedent_s: number
  test_s: number
}

/** More readings than this teach no more, because neighbours say the same, and cost time. */
const MOST_READINGS = 2_000

/** The included readings before pumping, every so many of a long record. @throws AnalysisError for uneven columns */
export function antecedentOf({ elapsed_s, drawdown_m, included }: Readings): Antecedent {
  if (elapsed_s.length !== drawdown_m.length) throw new AnalysisError('analysis/uneven-series', { wellId: '' })
  const used = elapsed_s.flatMap((time, i) =>
    Number.isFinite(time) && Number.isFinite(drawdown_m[i]) && (included?.[i] ?? true)
      ? [{ time, drawdown: drawdown_m[i] as number }]
      : [],
  )
  const before = used.filter(({ time }) => time <= 0).sort((a, b) => a.time - b.time)
  const stride = Math.ceil(before.length / MOST_READINGS)
  const chosen = before.filter((_, i) => i % stride === 0)
  return {
    elapsed_s: chosen.map(({ time }) => time),
    drawdown_m: chosen.map(({ drawdown }) => drawdown),
    antecedent_s: Math.max(0, -(before[0]?.time ?? 0)),
    test_s: used.reduce((most, { time }) => Math.max(most, time), 0),
  }
}

/** @throws AnalysisError with readings at fewer moments before pumping than a regression needs */
export function requireAntecedent({ elapsed_s }: Antecedent, needed: number): void {
  const found = new Set(elapsed_s).size
  if (found < needed) throw new AnalysisError('analysis/correction-readings', { needed, found })
}

/** A correction carried through the test needs as long a record before it. */
export function lengthFindings({ antecedent_s, test_s }: Antecedent): Finding[] {
  return antecedent_s < test_s
    ? [{ code: 'antecedent-short', severity: 'caution', params: { antecedent_s, test_s } }]
    : []
}

/** A correction that explains less than this share of the movement before pumping is weak (common practice). */
const WEAK = 0.5

/** Share of the squares left by everything else that a correction explains. */
export function explainedFindings(explained: number): Finding[] {
  return explained < WEAK ? [{ code: 'correction-weak', severity: 'caution', params: { explained } }] : []
}
