import { antecedentOf, explainedFindings, requireAntecedent, type Antecedent } from './antecedent.ts'
import { termOf, type WantedCorrection } from './catalogue.ts'
import type { Corrected, Correction, Readings } from './correction.ts'
import { learnTerms } from './learn-terms.ts'
import type { Learned, Term } from './term.ts'
import { trendTerm } from './trend.ts'

interface CorrectOptions {
  /** The static level is the mean before pumping: corrected readings get theirs back to zero. Default false. */
  meanBefore?: boolean
}

/**
 * Takes corrections off the readings of one well. What is given comes off first; everything that is learned is learned
 * together, by one regression on the readings before pumping, so that a trend is not taken for air pressure and a daily
 * wave of air pressure not for a tide. Effects that follow a series count from the start of pumping, tides by their
 * periods about their mean.
 * @throws AnalysisError for readings or a series that do not suffice
 */
export function correctReadings(
  readings: Readings,
  wanted: readonly WantedCorrection[],
  { meanBefore = false }: CorrectOptions = {},
): Corrected {
  const before = antecedentOf(readings)
  const terms = wanted.map((one) => termOf(one, readings, before))
  const found = findingsOfAll(terms, before)
  const corrections = terms.map((term): Correction => correctionOf(term, found.get(term) as Learned, readings, before))
  const unshifted = readings.drawdown_m.map((drawdown, i) =>
    corrections.reduce((left, { effect_m }) => left - (effect_m[i] as number), drawdown),
  )
  const shift_m = meanBefore ? meanBeforePumping(readings, unshifted) : 0
  return { drawdown_m: unshifted.map((value) => value - shift_m), shift_m, corrections }
}

/** Figures of each term: those given, and those learned beside level and trend. */
function findingsOfAll(terms: Term[], before: Antecedent): Map<Term, Learned> {
  const found = new Map(terms.flatMap((term) => (term.given ? [[term, asGiven(term)] as const] : [])))
  const learned = terms.filter(({ given }) => given === null)
  if (learned.length === 0) return found
  const trend = learned.find(({ kind }) => kind === 'trend') ?? trendTerm(before, null)
  const others = learned.filter((term) => term !== trend)
  requireAntecedent(before, fewestFor(learned, others))
  const rest = [...found].reduce(
    (left, [term, known]) => minus(left, effectOf(term, known, before.elapsed_s)),
    before.drawdown_m,
  )
  learnTerms({ trend, others }, before.elapsed_s, rest).forEach((figures, term) => found.set(term, figures))
  return found
}

/** What the most demanding term takes, and two moments more than there are figures beside level and trend. */
function fewestFor(learned: Term[], others: Term[]): number {
  const figures = others.reduce((sum, term) => sum + term.columns([], term.lags_s[0] as number).length, 0)
  return Math.max(...learned.map(({ needed }) => needed), others.length > 0 ? figures + 4 : 0)
}

const asGiven = ({ given, lags_s }: Term): Learned => ({
  coefficients: given as number[],
  covariance: [],
  lag_s: lags_s[0] as number,
  explained: NaN,
})

function correctionOf(term: Term, learned: Learned, { elapsed_s }: Readings, before: Antecedent): Correction {
  const given = term.given !== null
  return {
    kind: term.kind,
    given,
    effect_m: effectOf(term, learned, elapsed_s),
    record: { ...term.record(learned), ...(given ? {} : spanOf(learned, before)) },
    findings: [...term.findings(learned), ...(given ? [] : explainedFindings(learned.explained))],
  }
}

/** What was learned from how much. */
const spanOf = ({ explained }: Learned, { antecedent_s, elapsed_s }: Antecedent) => ({
  explained,
  antecedent_s,
  readings: elapsed_s.length,
})

function effectOf(term: Term, { coefficients, lag_s }: Learned, times: readonly number[]): number[] {
  const columns = term.columns(times, lag_s)
  return times.map((_, i) =>
    columns.reduce((sum, column, k) => sum + (coefficients[k] as number) * (column[i] as number), 0),
  )
}

const minus = (values: number[], taken: number[]) => values.map((value, i) => value - (taken[i] as number))

function meanBeforePumping({ elapsed_s, included }: Readings, drawdown_m: number[]): number {
  const before = drawdown_m.filter((_, i) => (elapsed_s[i] as number) <= 0 && (included?.[i] ?? true))
  return before.length > 0 ? before.reduce((sum, value) => sum + value, 0) / before.length : 0
}
