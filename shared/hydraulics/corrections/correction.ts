import { AnalysisError, type Finding } from '../analysis.ts'

/** Readings of one well as drawdown, on the clock on which pumping begins at zero. */
export interface Readings {
  elapsed_s: number[]
  drawdown_m: number[]
}

/** A series from elsewhere, on the same clock: air pressure as metres of water, a river's stage. */
export interface Outside {
  elapsed_s: number[]
  value_m: number[]
}

/** What a correction did. Raw readings stay: drawdown = corrected + effect, reading by reading. */
export interface Correction {
  id: 'trend' | 'barometric' | 'river' | 'tides'
  corrected_m: number[]
  /** What was taken off each reading. */
  effect_m: number[]
  /** Figures of the correction by name, in SI, for the record. */
  record: Record<string, number>
  findings: Finding[]
}

/** Readings of before pumping, from which corrections learn. */
export interface Antecedent extends Readings {
  /** Length of the record before pumping, and of the test. */
  antecedent_s: number
  test_s: number
}

/** @throws AnalysisError with columns of different length, or fewer readings before pumping than needed */
export function antecedentOf({ elapsed_s, drawdown_m }: Readings, needed: number): Antecedent {
  if (elapsed_s.length !== drawdown_m.length) throw new AnalysisError('analysis/uneven-series', { wellId: '' })
  const before = elapsed_s.flatMap((time, i) =>
    time <= 0 && Number.isFinite(drawdown_m[i]) ? [{ time, drawdown: drawdown_m[i] as number }] : [],
  )
  if (new Set(before.map(({ time }) => time)).size < needed) {
    throw new AnalysisError('analysis/correction-readings', { needed, found: before.length })
  }
  return {
    elapsed_s: before.map(({ time }) => time),
    drawdown_m: before.map(({ drawdown }) => drawdown),
    antecedent_s: -before.reduce((least, { time }) => Math.min(least, time), 0),
    test_s: elapsed_s.reduce((most, time) => (time > most ? time : most), 0),
  }
}

/** A correction carried through the test needs as long a record before it. */
export function lengthFindings({ antecedent_s, test_s }: Antecedent): Finding[] {
  return antecedent_s < test_s
    ? [{ code: 'antecedent-short', severity: 'caution', params: { antecedent_s, test_s } }]
    : []
}

/** A correction that explains less than this share of the movement before pumping is weak (common practice). */
const WEAK = 0.5

/** Share of the squares about their mean that a correction explains. */
export function explainedFindings(explained: number): Finding[] {
  return explained < WEAK ? [{ code: 'correction-weak', severity: 'caution', params: { explained } }] : []
}

/** Assembles a correction from its effect on each reading. */
export function correctionOf(
  id: Correction['id'],
  { drawdown_m }: Readings,
  effect_m: number[],
  record: Record<string, number>,
  findings: Finding[],
): Correction {
  return {
    id,
    corrected_m: drawdown_m.map((drawdown, i) => drawdown - (effect_m[i] as number)),
    effect_m,
    record,
    findings,
  }
}

/** The raw drawdowns again. */
export const undone = ({ corrected_m, effect_m }: Correction): number[] =>
  corrected_m.map((value, i) => value + (effect_m[i] as number))
