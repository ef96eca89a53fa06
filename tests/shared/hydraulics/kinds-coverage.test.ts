import { describe, expect, it } from 'vitest'
import { analyseKind } from '#shared/hydraulics/kinds.ts'
import { slugResponse } from '#shared/hydraulics/slug/cooper-bredehoeft-papadopulos.ts'
import { springDisplacement } from '#shared/hydraulics/slug/damped-spring.ts'
import { makeNoise } from '../numerics/make-noise.ts'
import { logSpaced } from './make-inputs.ts'
import { makeRepeat, makeSlugInputs, makeSlugOptions } from './make-slug.ts'
import { makeStepInputs, stepTruth } from './make-steps.ts'

const SEEDS = 200
/** Two hundred fits on a busy machine. */
const PATIENCE_MS = 60_000

/** Share of seeds whose 95 % interval holds the truth. */
function coverage(truth: number, interval: (seed: number) => { low: number; high: number } | null | undefined): number {
  let held = 0
  for (let seed = 1; seed <= SEEDS; seed++) {
    const found = interval(seed)
    if (found && found.low <= truth && truth <= found.high) held++
  }
  return held / SEEDS
}

function slugCoverage(id: string, truth: number, elapsed_s: number[], head: (time: number) => number, sd: number) {
  return coverage(truth, (seed) => {
    const noise = makeNoise(seed, elapsed_s.length)
    const displacement_m = elapsed_s.map((time, i) => head(time) + sd * (noise[i] as number))
    const repeats = [makeRepeat({ initial_m: 1, elapsed_s, displacement_m })]
    const inputs = makeSlugInputs({
      repeats,
      casingRadius_m: 0.05,
      screenRadius_m: 0.05,
      storage: { value: 1e-4, logSd: 0 },
    })
    return analyseKind('slug', id, inputs, makeSlugOptions()).K
  })
}

describe('95 % intervals over 200 seeds of white noise hold the truth in 90 to 99 %', () => {
  it('for the well loss of four steps', () => {
    const share = coverage(stepTruth.C, (seed) => {
      const noise = makeNoise(seed, 80)
      const inputs = makeStepInputs({ noise: (i) => 0.01 * (noise[i] as number) })
      return analyseKind('step', 'step-linear', inputs, {}).others?.find(({ id }) => id === 'C')
    })
    expect(share).toBeGreaterThanOrEqual(0.9)
    expect(share).toBeLessThanOrEqual(0.995)
  })

  it('for K of a line', () => {
    const times = Array.from({ length: 200 }, (_, i) => (i + 1) / 2)
    const fall = (time: number) => Math.exp(-time / 40)
    const exact = makeSlugInputs({
      repeats: [makeRepeat({ initial_m: 1, elapsed_s: times, displacement_m: times.map(fall) })],
      casingRadius_m: 0.05,
      screenRadius_m: 0.05,
    })
    const truth = analyseKind('slug', 'hvorslev', exact, makeSlugOptions()).K?.value ?? NaN
    const share = slugCoverage('hvorslev', truth, times, fall, 0.002)
    expect(share).toBeGreaterThanOrEqual(0.9)
    expect(share).toBeLessThanOrEqual(0.99)
  })

  it(
    'for K of a curve with storage',
    () => {
      const head = (time: number) => slugResponse(4e-5, 5e-3, 0.05, 0.05, time)
      const share = slugCoverage('cooper-bredehoeft-papadopulos', 2e-5, logSpaced(40, 2, 600), head, 0.005)
      expect(share).toBeGreaterThanOrEqual(0.9)
      expect(share).toBeLessThanOrEqual(0.99)
    },
    PATIENCE_MS,
  )

  it(
    'for K of a swing',
    () => {
      const times = Array.from({ length: 60 }, (_, i) => (i + 1) / 2)
      const head = (time: number) => springDisplacement({ frequency_1_s: 0.8, damping: 0.15 }, time)
      const inputs = makeSlugInputs({
        repeats: [makeRepeat({ initial_m: 1, elapsed_s: times, displacement_m: times.map(head) })],
        casingRadius_m: 0.05,
        screenRadius_m: 0.05,
        storage: { value: 1e-4, logSd: 0 },
      })
      const truth = analyseKind('slug', 'slug-oscillating', inputs, makeSlugOptions()).K?.value ?? NaN
      const share = slugCoverage('slug-oscillating', truth, times, head, 0.01)
      expect(share).toBeGreaterThanOrEqual(0.9)
      expect(share).toBeLessThanOrEqual(0.99)
    },
    PATIENCE_MS,
  )
})
