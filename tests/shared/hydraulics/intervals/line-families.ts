import type { AnalysisInputs, AnalysisOptions, Series } from '#shared/hydraulics/analysis.ts'
import { cooperJacob } from '#shared/hydraulics/cooper-jacob.ts'
import { distanceDrawdown } from '#shared/hydraulics/distance-drawdown.ts'
import type { Method } from '#shared/hydraulics/method.ts'
import { recoveryEquivalentTime } from '#shared/hydraulics/recovery-equivalent-time.ts'
import { recovery } from '#shared/hydraulics/recovery.ts'
import { steadyState } from '#shared/hydraulics/steady-state.ts'
import { theis } from '#shared/hydraulics/theis.ts'
import { DAY, logSpaced, makeInputs, makeOptions, makeSeries } from '../make-inputs.ts'
import { withDrawdown } from '../make-readings.ts'
import { countsOf, withNoise } from './curve-families.ts'
import type { Family } from './family.ts'

export const lineTruth = { T: 5e-3, S: 2e-4 }
const SIGMA_M = 0.01

/** A synthetic test of one straight-line method. */
export interface LineTest {
  method: Method
  inputs: AnalysisInputs
  options?: Partial<AnalysisOptions>
  found: ('T' | 'S')[]
}

/** Late readings of the confined curve, so that the line itself is off by less than its interval is wide. */
function lineFamily({ method, inputs, options = {}, found }: LineTest): Family {
  const exact = withDrawdown(theis, [lineTruth.T, lineTruth.S], inputs)
  const chosen = makeOptions({ wellIds: inputs.series.map(({ wellId }) => wellId), ...options })
  return {
    id: method.id,
    laplace: false,
    truth: Object.fromEntries(found.map((id) => [id, lineTruth[id]])),
    counts: countsOf(inputs),
    find: (noise) => {
      const outcome = method.run(withNoise(exact, noise, SIGMA_M), chosen)
      return { T: outcome.T, S: outcome.S }
    },
  }
}

const near = (elapsed_s: number[]) => makeSeries({ distance_m: 5, elapsed_s })
const after = (times: number[]) => times.map((time) => DAY + time)
const recovered = makeInputs({
  rates: [
    { start_s: 0, rate_m3_s: 0.01 },
    { start_s: DAY, rate_m3_s: 0 },
  ],
  series: [near([...logSpaced(20, DAY / 10, DAY - 1), ...after(logSpaced(40, 60, DAY / 2))])],
})
const wells = (elapsed_s: number[]): Series[] =>
  [5, 8, 12, 18, 27, 40].map((distance_m, i) => makeSeries({ wellId: `o${i}`, distance_m, elapsed_s }))

export const lineTests: LineTest[] = [
  { method: cooperJacob, inputs: makeInputs({ series: [near(logSpaced(40, 600, DAY))] }), found: ['T', 'S'] },
  { method: distanceDrawdown, inputs: makeInputs({ series: wells([DAY - 60, DAY]) }), options: { time_s: DAY }, found: ['T', 'S'] }, // prettier-ignore
  { method: steadyState, inputs: makeInputs({ series: wells(logSpaced(10, 0.9 * DAY, DAY)) }), found: ['T'] },
  { method: recovery, inputs: recovered, found: ['T'] },
  { method: recoveryEquivalentTime, inputs: recovered, found: ['T', 'S'] },
]

export const lineFamilies: Family[] = lineTests.map(lineFamily)
