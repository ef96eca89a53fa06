import { AnalysisError } from './analysis-error.ts'
import type { RateStep } from './analysis.ts'

/** A change of rate, for superposition. */
export interface RateIncrement {
  start_s: number
  change_m3_s: number
}

/** A checked rate history: what was pumped, from when, until when. */
export interface RateHistory {
  increments: RateIncrement[]
  start_s: number
  /** Start of the final rest; null while pumping goes on. */
  stop_s: number | null
  /** Rate of the last step in which water was pumped. */
  lastRate_m3_s: number
  steps: RateStep[]
}

/** Rate may vary by this share of its mean before a constant-rate method is doubted (common practice). */
export const RATE_VARIATION_LIMIT = 0.1

/** @throws AnalysisError when a rate is missing, negative, not finite, or steps do not follow each other */
export function rateHistory(steps: RateStep[]): RateHistory {
  steps.forEach((step, i) => checkStep(step, steps[i - 1]))
  const pumping = steps.filter((step) => step.rate_m3_s > 0)
  const first = pumping[0]
  const last = pumping.at(-1)
  if (!first || !last) throw new AnalysisError('analysis/no-rate')
  return {
    increments: incrementsOf(steps),
    start_s: first.start_s,
    stop_s: steps[steps.indexOf(last) + 1]?.start_s ?? null,
    lastRate_m3_s: last.rate_m3_s,
    steps,
  }
}

/** Volume pumped up to a moment. */
export function volumeUntil({ steps }: RateHistory, time_s: number): number {
  return steps.reduce((volume, step, i) => {
    const end = Math.min(time_s, steps[i + 1]?.start_s ?? Infinity)
    return volume + step.rate_m3_s * Math.max(0, end - step.start_s)
  }, 0)
}

/** Mean rate from the start of pumping to a moment in it. */
export function meanRate(history: RateHistory, until_s: number): number {
  const until = Math.min(until_s, history.stop_s ?? Infinity)
  if (!(until > history.start_s)) return history.lastRate_m3_s
  return volumeUntil(history, until) / (until - history.start_s)
}

/** Largest departure of the rate from its mean up to a moment, as a share of the mean; pauses count. */
export function rateVariation(history: RateHistory, until_s: number): number {
  const mean = meanRate(history, until_s)
  const until = Math.min(until_s, history.stop_s ?? Infinity)
  const running = history.steps.filter((step) => step.start_s >= history.start_s && step.start_s < until)
  return Math.max(0, ...running.map((step) => Math.abs(step.rate_m3_s - mean) / mean))
}

function checkStep(step: RateStep, previous: RateStep | undefined): void {
  if (!Number.isFinite(step.rate_m3_s) || !Number.isFinite(step.start_s)) throw new AnalysisError('analysis/bad-rate')
  if (step.rate_m3_s < 0) throw new AnalysisError('analysis/negative-rate', { rate_m3_s: step.rate_m3_s })
  if (previous && step.start_s <= previous.start_s) {
    throw new AnalysisError('analysis/rates-out-of-order', { start_s: step.start_s })
  }
}

function incrementsOf(steps: RateStep[]): RateIncrement[] {
  return steps
    .map((step, i) => ({ start_s: step.start_s, change_m3_s: step.rate_m3_s - (steps[i - 1]?.rate_m3_s ?? 0) }))
    .filter((increment) => increment.change_m3_s !== 0)
}
