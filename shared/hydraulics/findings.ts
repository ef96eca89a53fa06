import type { AnalysisInputs, AnalysisOptions, Finding, FitSummary, OtherEstimate, StorageClass } from './analysis.ts'
import type { Unknown } from './method.ts'
import { RATE_VARIATION_LIMIT, rateVariation, type RateHistory } from './rates.ts'
import type { Selected } from './selection.ts'
import { isAfterDrainage } from './unconfined.ts'
import { DISTANCE_ERROR_LIMIT, distanceError } from './wells.ts'

/** Fewer readings than this make a fit easy to upset (common practice). */
const FEW_READINGS = 8
/** Residuals so alike that the readings are worth less than this share of their number are noted. */
const NOTABLE_SHARE = 0.5
/** A straight line over less than this share of a factor of ten is short (common practice asks for a whole one). */
const SHORT_WINDOW = 0.7

/** S from the pumped well mixes storage with skin and well loss. */
export const pumpedStorageFinding: Finding = { code: 'no-storage-from-pumped-well', severity: 'note', params: {} }
export const handLineFinding: Finding = { code: 'hand-line', severity: 'note', params: {} }

/** Warns when a method that assumes one rate meets another. */
export function rateFindings(history: RateHistory, until_s: number): Finding[] {
  const variation = rateVariation(history, until_s)
  if (variation <= RATE_VARIATION_LIMIT) return []
  return [{ code: 'rate-varied', severity: 'caution', params: { variation, limit: RATE_VARIATION_LIMIT } }]
}

/** Two parameters that move together this closely cannot be told apart by the readings (common practice). */
const CORRELATION_LIMIT = 0.95

/** Names pairs of unknowns that the readings do not tell apart. T and S of one well are often alike; that pair is shown as a figure. */
export function correlationFindings(unknowns: readonly Unknown[], covariance: number[][]): Finding[] {
  const at = (i: number, j: number) => (covariance[i] as number[])[j] as number
  return unknowns.flatMap((one, i) =>
    unknowns.slice(Math.max(2, i + 1)).flatMap((other, skipped) => {
      const j = Math.max(2, i + 1) + skipped
      const correlation = at(i, j) / Math.sqrt(at(i, i) * at(j, j))
      if (!(Math.abs(correlation) > CORRELATION_LIMIT)) return []
      const params = { one: one.id, other: other.id, correlation, limit: CORRELATION_LIMIT }
      return [{ code: 'parameters-correlated', severity: 'caution' as const, params }]
    }),
  )
}

/** What the number and likeness of the residuals say. */
export function fitFindings(fit: FitSummary): Finding[] {
  const findings: Finding[] = []
  if (fit.n < FEW_READINGS) findings.push({ code: 'few-readings', severity: 'note', params: { n: fit.n } })
  if (fit.effectiveN < NOTABLE_SHARE * fit.n) {
    const params = { autocorrelation: fit.autocorrelation, n: fit.n, effectiveN: fit.effectiveN }
    findings.push({ code: 'residuals-correlated', severity: 'note', params })
  }
  if (fit.weighedLess) {
    findings.push({ code: 'readings-weighed-less', severity: 'note', params: { count: fit.weighedLess, n: fit.n } })
  }
  if (!fit.converged) findings.push({ code: 'not-converged', severity: 'bad', params: { iterations: fit.iterations } })
  return findings
}

/** Names each parameter that the readings leave open. */
export function determinationFindings(
  estimates: Record<string, Pick<OtherEstimate, 'low' | 'high' | 'determined'> | null>,
): Finding[] {
  return Object.entries(estimates).flatMap(([parameter, estimate]) =>
    estimate && !estimate.determined
      ? [
          {
            code: 'not-determined',
            severity: 'bad',
            params: { parameter, factor: estimate.high / estimate.low },
          } as const,
        ]
      : [],
  )
}

export function windowFindings(from_s: number, to_s: number): Finding[] {
  const cycles = Math.log10(to_s / from_s)
  return cycles < SHORT_WINDOW ? [{ code: 'window-short', severity: 'caution', params: { from_s, to_s, cycles } }] : []
}

/** Distances too uncertain for S. */
export function distanceFindings(wells: Selected[]): Finding[] {
  return wells
    .filter(({ series }) => distanceError(series) > DISTANCE_ERROR_LIMIT)
    .map(({ series }) => ({
      code: 'distance-uncertain',
      severity: 'caution' as const,
      params: {
        well: series.label,
        distance_m: series.distance_m,
        distanceSd_m: series.distanceSd_m,
        share: distanceError(series),
        limit: DISTANCE_ERROR_LIMIT,
      },
    }))
}

/** The aquifer's kind against the kinds that a method describes; without `described`, a confined one. */
export function aquiferFindings(
  inputs: AnalysisInputs,
  options: AnalysisOptions,
  last_s: number,
  described: readonly AnalysisInputs['aquifer'][] = ['confined'],
): Finding[] {
  if (described.includes(inputs.aquifer)) return []
  if (!described.includes('confined'))
    return [{ code: 'aquifer-unlike', severity: 'caution', params: { aquifer: inputs.aquifer } }]
  if (inputs.aquifer === 'leaky') return [{ code: 'aquifer-leaky', severity: 'caution', params: {} }]
  return isAfterDrainage(options, last_s)
    ? [{ code: 'drainage-over', severity: 'good', params: { last_s } }]
    : [{ code: 'drainage-not-over', severity: 'caution', params: { last_s } }]
}

/** Class of a storage value from the response that gave it. */
export function storageClassOf(inputs: AnalysisInputs, options: AnalysisOptions, last_s: number): StorageClass {
  if (inputs.aquifer !== 'unconfined') return 'elastic'
  return isAfterDrainage(options, last_s) ? 'specific-yield' : 'apparent'
}
