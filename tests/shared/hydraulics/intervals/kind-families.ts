import { analyseKind } from '#shared/hydraulics/kinds.ts'
import { slugResponse } from '#shared/hydraulics/slug/cooper-bredehoeft-papadopulos.ts'
import { springDisplacement } from '#shared/hydraulics/slug/damped-spring.ts'
import type { SlugInputs } from '#shared/hydraulics/slug/slug-test.ts'
import { logSpaced } from '../make-inputs.ts'
import { makeRepeat, makeSlugInputs, makeSlugOptions } from '../make-slug.ts'
import { makeStepInputs, stepTruth } from '../make-steps.ts'
import type { Family } from './family.ts'

interface Slug {
  id: string
  elapsed_s: number[]
  head: (time_s: number) => number
  sigma_m: number
  inputs?: Partial<SlugInputs>
  /** Left out: what the method makes of exact heads. */
  K?: number
  laplace?: boolean
}

const RADIUS_M = 0.05
const thin = { casingRadius_m: RADIUS_M, screenRadius_m: RADIUS_M, storage: { value: 1e-4, logSd: 0 } }

function slugFamily({ id, elapsed_s, head, sigma_m, inputs = {}, laplace = false, ...known }: Slug): Family {
  const exact = elapsed_s.map(head)
  const analysed = (displacement_m: number[]) => {
    const repeats = [makeRepeat({ initial_m: 1, elapsed_s, displacement_m })]
    return analyseKind('slug', id, makeSlugInputs({ ...thin, ...inputs, repeats }), makeSlugOptions()).K
  }
  return {
    id,
    laplace,
    truth: { K: known.K ?? analysed(exact)?.value ?? NaN },
    counts: [elapsed_s.length],
    find: (noise) => ({ K: analysed(exact.map((value, i) => value + sigma_m * (noise[i] as number))) }),
  }
}

function stepFamily(): Family {
  return {
    id: 'step-linear',
    laplace: false,
    truth: { C: stepTruth.C },
    counts: [80],
    find: (noise) => {
      const inputs = makeStepInputs({ noise: (i) => 0.01 * (noise[i] as number) })
      return { C: analyseKind('step', 'step-linear', inputs, {}).others?.find(({ id }) => id === 'C') }
    },
  }
}

const evenly = (count: number, step_s: number) => Array.from({ length: count }, (_, i) => step_s * (i + 1))
const falling = (time_s: number) => Math.exp(-time_s / 40)

/** Steps, and slugs by each method: K of a line and of a swing is what the method gives for exact heads. */
export const kindFamilies: Family[] = [
  stepFamily(),
  slugFamily({ id: 'hvorslev', elapsed_s: evenly(100, 1), head: falling, sigma_m: 0.002 }),
  slugFamily({ id: 'bouwer-rice', elapsed_s: evenly(100, 1), head: falling, sigma_m: 0.002 }),
  slugFamily({
    id: 'cooper-bredehoeft-papadopulos',
    elapsed_s: logSpaced(30, 2, 600),
    // T 4e-5 m²/s and S 5e-3 over a screen of 2 m.
    head: (time_s) => slugResponse(4e-5, 5e-3, RADIUS_M, RADIUS_M, time_s),
    sigma_m: 0.005,
    K: 2e-5,
    laplace: true,
  }),
  slugFamily({
    id: 'slug-oscillating',
    elapsed_s: evenly(60, 0.5),
    head: (time_s) => springDisplacement({ frequency_1_s: 0.8, damping: 0.15 }, time_s),
    sigma_m: 0.01,
  }),
]
