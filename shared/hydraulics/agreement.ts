import type { ParameterEstimate } from './analysis.ts'

/** What agreement needs to know of an analysis. */
export interface ComparedAnalysis {
  id: string
  label: string
  T: ParameterEstimate
  wellIds: string[]
  /** Which readings were used. */
  phase: 'pumping' | 'recovery'
  /** Whether T rests on distances (distance–drawdown, joint curve fits). */
  usesDistances: boolean
}

export type SharedBasis = 'rate' | 'same-readings' | 'same-well' | 'other-well' | 'distances'

/** Ratio of T of two analyses of one test; the sentence is in shared/words/agreement.ts. */
export interface Agreement {
  a: string
  b: string
  /** Larger over smaller, at least 1. */
  ratio: number
  code: 'agree' | 'agree-roughly' | 'disagree'
  /** Whether the 95 % intervals meet. */
  intervalsMeet: boolean
  shared: SharedBasis[]
  params: Record<string, number | string>
}

/** Ratios of T up to which two analyses agree, and agree roughly (common practice). */
export const AGREEMENT_RATIO = { agree: 1.25, roughly: 2 }

/** Compares every pair of analyses of one test, in the order given. */
export function agreements(analyses: ComparedAnalysis[]): Agreement[] {
  return analyses.flatMap((a, i) => analyses.slice(i + 1).map((b) => agreementOf(a, b)))
}

export function agreementOf(a: ComparedAnalysis, b: ComparedAnalysis): Agreement {
  const ratio = Math.max(a.T.value / b.T.value, b.T.value / a.T.value)
  return {
    a: a.id,
    b: b.id,
    ratio,
    code: ratio <= AGREEMENT_RATIO.agree ? 'agree' : ratio <= AGREEMENT_RATIO.roughly ? 'agree-roughly' : 'disagree',
    intervalsMeet: a.T.low <= b.T.high && b.T.low <= a.T.high,
    shared: sharedBasis(a, b),
    params: { a: a.label, b: b.label, ratio, aT: a.T.value, bT: b.T.value },
  }
}

/** Whether another analysis confirms one by the recovery: not where both look at the same readings of it. */
export function recoveryConfirms(mine: ComparedAnalysis, other: ComparedAnalysis): boolean {
  const { code, shared } = agreementOf(mine, other)
  return other.phase === 'recovery' && code !== 'disagree' && !shared.includes('same-readings')
}

/** Two analyses of one test always share the pumping rate, so that their agreement never confirms it. */
function sharedBasis(a: ComparedAnalysis, b: ComparedAnalysis): SharedBasis[] {
  const sameWell = a.wellIds.some((wellId) => b.wellIds.includes(wellId))
  const readings: SharedBasis = sameWell ? (a.phase === b.phase ? 'same-readings' : 'same-well') : 'other-well'
  return ['rate', readings, ...(a.usesDistances && b.usesDistances ? (['distances'] as const) : [])]
}
