import { describe, expect, it, vi } from 'vitest'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import type { ParameterEstimate } from '#shared/hydraulics/analysis.ts'
import type { MethodId } from '#shared/hydraulics/catalogue.ts'
import { makeNoise } from '../numerics/make-noise.ts'
import { DAY, logSpaced, makeInputs, makeOptions, makeTheisSeries } from './make-inputs.ts'

// Hundreds of fits: slow on a machine that does other things too.
vi.setConfig({ testTimeout: 120_000 })

const truth = { T: 5e-3, S: 2e-4 }
const SEEDS = 100
const minutes = Array.from({ length: 3 * 1440 }, (_, i) => 60 * (i + 1))

const holds = (estimate: ParameterEstimate | null, value: number) =>
  estimate !== null && estimate.low <= value && value <= estimate.high

/** Share of seeds 1…100 whose 95 % interval of T holds the truth. */
function coverage(method: MethodId, elapsed_s: number[], phi: number, from_s: number | null = null): number {
  let covered = 0
  for (let seed = 1; seed <= SEEDS; seed++) {
    const noise = makeNoise(seed, elapsed_s.length, { phi }).map((value) => 0.01 * value)
    const series = makeTheisSeries(truth, { elapsed_s, noise })
    const window = from_s === null ? null : { from_s, to_s: elapsed_s.at(-1) as number }
    if (holds(analyse(method, makeInputs({ series: [series] }), makeOptions({ window })).T, truth.T)) covered++
  }
  return covered / SEEDS
}

/** Limits leave room for 100 seeds (binomial sd 2.2 %) below, and for caution above. */
const LOW = 0.9

describe('95 % intervals of T', () => {
  it.each([
    ['white noise, 60 readings', logSpaced(60, 60, DAY), 0],
    ['white noise, a 72 h one-minute log', minutes, 0],
    ['noise that lasts 50 min (φ 0.98), a 72 h one-minute log', minutes, 0.98],
    ['noise alike from reading to reading (φ 0.7), 100 readings', logSpaced(100, 60, DAY), 0.7],
    ['noise that lasts a quarter of a short log (φ 0.9), 40 readings', logSpaced(40, 60, DAY), 0.9],
  ])('of a Theis fit hold the truth: %s', (_, elapsed_s, phi) => {
    expect(coverage('theis', elapsed_s, phi)).toBeGreaterThanOrEqual(LOW)
  })

  it.each([
    ['white noise', 0],
    ['noise that lasts 50 min', 0.98],
  ])('of a straight line over a 72 h one-minute log hold the truth: %s', (_, phi) => {
    // From here on u is below 0.005, so that the line itself is right within 0.5 %.
    expect(coverage('cooper-jacob', minutes, phi, 5000)).toBeGreaterThanOrEqual(LOW)
  })

  it('are not made wide to be safe: white noise gives less than twice the least possible width', () => {
    const widths = Array.from({ length: 30 }, (_, k) => {
      const noise = makeNoise(k + 1, 60).map((value) => 0.01 * value)
      const series = makeTheisSeries(truth, { elapsed_s: logSpaced(60, 60, DAY), noise })
      const { T, fit } = analyse('theis', makeInputs({ series: [series] }), makeOptions())
      expect(fit.effectiveN).toBeLessThanOrEqual(fit.n)
      return Math.log((T?.high ?? NaN) / (T?.low ?? NaN))
    }).sort((a, b) => a - b)
    // 0.0089 is the half-width of white noise with known statistics, from J'J at the truth (beside scipy, σ 0.01 m).
    expect(widths[15]).toBeLessThan(2 * 2 * 0.0089)
  })
})
