import type { AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import { analyse, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { timePlot, type TimePlot, type TimePlotRequest } from '#shared/charts/time-plot.ts'
import type { Fit } from '#shared/charts/fit-band.ts'
import { logSpaced, makeInputs, makeOptions, makeTheisSeries, type Truth } from '../hydraulics/make-inputs.ts'

export const truth: Truth = { T: 0.005, S: 2e-4 }
const STOP_S = 86_400

/** A day of pumping and a day of recovery in one observation well, exactly Theis, with a little seeded noise if asked. */
export function makeTestInputs({ noise = 0 } = {}) {
  const rates = [
    { start_s: 0, rate_m3_s: 0.01 },
    { start_s: STOP_S, rate_m3_s: 0 },
  ]
  const elapsed_s = [...logSpaced(60, 30, STOP_S), ...logSpaced(60, 30, STOP_S).map((time) => STOP_S + time)]
  // Alternating signs: residuals that tell independently, with no chance in them.
  const strays = elapsed_s.map((_, i) => noise * [1, -1, 0.5, -0.5, -1, 1][i % 6]!)
  const series = makeTheisSeries(truth, { rates, elapsed_s, included: elapsed_s.map(() => true), noise: strays })
  return makeInputs({ rates, series: [series] })
}

export const makePlot = (overrides: Partial<TimePlotRequest> = {}): TimePlot =>
  timePlot({
    kind: 'semi-log',
    inputs: makeTestInputs(),
    wellIds: ['o1'],
    options: {},
    units: { time: 'min', length: 'm' },
    direction: 'down',
    ...overrides,
  })

export function makeFit(method: MethodId, options: Partial<AnalysisOptions> = {}, inputs = makeTestInputs()): Fit {
  const chosen = makeOptions(options)
  return { inputs, options: chosen, result: analyse(method, inputs, chosen) }
}
