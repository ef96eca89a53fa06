import type { Finding } from '../analysis.ts'
import { casingFinding } from '../casing-storage.ts'
import { transmissivityFromSlope } from '../cooper-jacob.ts'
import type { StepIncrements } from './increments.ts'
import type { LossFit } from './loss-fit.ts'
import type { StepInputs, StepOptions } from './step-test.ts'
import { lossInterval, predict } from './well-loss.ts'

/** Limits of C in s²/m⁵: 5, 10 and 40 s²/ft⁵. Source: Walton 1962, from memory. */
const FOOT_5 = 0.3048 ** 5
export const LOSS_LIMITS = { good: 5 / FOOT_5, raised: 10 / FOOT_5 }
/** Trends of the steps may differ by this factor before one of them is doubted (common practice). */
const TREND_RATIO = 1.5
/** Durations of steps may differ by this share (common practice). */
const DURATION_SHARE = 0.05

/** What the steps themselves say. */
export function stepFindings(increments: StepIncrements, { well }: StepInputs): Finding[] {
  const { points, trend, increment_s } = increments
  const durations = points.map(({ from_s, to_s }) => to_s - from_s)
  const [shortest_s, longest_s] = [Math.min(...durations), Math.max(...durations)]
  const unequal: Finding[] =
    longest_s > shortest_s * (1 + DURATION_SHARE)
      ? [{ code: 'steps-unequal', severity: 'note', params: { shortest_s, longest_s, increment_s } }]
      : []
  const flat: Finding[] = trend > 0 ? [] : [{ code: 'step-trend-level', severity: 'note', params: {} }]
  const casing = trend > 0 ? [casingFinding(transmissivityFromSlope(1, trend), well, increment_s, 'drawdown')] : []
  return [...unequal, ...flat, ...trendFindings(increments), ...casing]
}

/** A trend that changes from step to step: development, a boundary, or a rate that was not constant. */
function trendFindings({ trends }: StepIncrements): Finding[] {
  const steepest = trends.reduce((a, b) => (b.trend > a.trend ? b : a))
  const gentlest = trends.reduce((a, b) => (b.trend < a.trend ? b : a))
  const apart = steepest.trend - gentlest.trend > 2 * Math.hypot(steepest.sd, gentlest.sd)
  if (!apart || (gentlest.trend > 0 && steepest.trend / gentlest.trend <= TREND_RATIO)) return []
  const params = { step: trends.indexOf(steepest) + 1, other: trends.indexOf(gentlest) + 1 }
  return [{ code: 'step-trends-differ', severity: 'caution', params }]
}

/** What the losses say: their signs, how sure they are, how large. */
export function lossFindings({ loss }: LossFit): Finding[] {
  const [B, C] = [lossInterval(loss, 0), lossInterval(loss, 1)]
  const findings: Finding[] = []
  if (!(B.value > 0)) findings.push({ code: 'negative-formation-loss', severity: 'bad', params: { B: B.value } })
  if (C.value < 0) {
    findings.push({ code: 'negative-well-loss', severity: 'caution', params: { C: C.value, high: C.high } })
  } else if (C.low < 0) {
    findings.push({ code: 'well-loss-unclear', severity: 'note', params: { C: C.value, high: C.high } })
  } else if (loss.P === 2) findings.push(sizeFinding(C.value))
  return findings
}

function sizeFinding(C: number): Finding {
  const params = { C, good: LOSS_LIMITS.good, raised: LOSS_LIMITS.raised }
  if (C <= LOSS_LIMITS.good) return { code: 'well-loss-small', severity: 'good', params }
  if (C <= LOSS_LIMITS.raised) return { code: 'well-loss-raised', severity: 'note', params }
  return { code: 'well-loss-large', severity: 'caution', params }
}

/** What the free exponent says beyond the losses. */
export function exponentFindings(fit: LossFit, { points }: StepIncrements): Finding[] {
  const findings: Finding[] = []
  const { value, low, high } = lossInterval(fit.loss, 2)
  if (fit.lossAtZero) findings.push({ code: 'well-loss-none', severity: 'caution', params: {} })
  else if (fit.exponentAtBound) findings.push({ code: 'exponent-at-bound', severity: 'caution', params: { P: value } })
  else if (high - low > 1)
    findings.push({ code: 'exponent-open', severity: 'caution', params: { P: value, low, high } })
  if (points.length === 3) findings.push({ code: 'exponent-exact', severity: 'note', params: { steps: 3 } })
  if (!fit.converged) findings.push({ code: 'not-converged', severity: 'bad', params: { iterations: fit.iterations } })
  return findings
}

/** A rate asked for outside those tested. */
export function predictionFindings({ loss }: LossFit, { predictedRate_m3_s = null }: StepOptions): Finding[] {
  if (predictedRate_m3_s === null || !predict(loss, predictedRate_m3_s).beyond) return []
  const params = { rate_m3_s: predictedRate_m3_s, low_m3_s: loss.rates.low, high_m3_s: loss.rates.high }
  return [{ code: 'rate-beyond-steps', severity: 'caution', params }]
}
