import type { AnalysisInputs, Series } from '#shared/hydraulics/analysis.ts'
import { placeOf } from '#shared/hydraulics/place.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'
import { selectReadings } from '#shared/hydraulics/selection.ts'
import type { Solution, SolutionReadings } from '#shared/hydraulics/solution.ts'
import { drawdownHistory } from '#shared/hydraulics/superposition.ts'
import { makeOptions } from './make-inputs.ts'

/** The inputs with drawdowns that are exactly a solution's, plus noise by reading where given. */
export function withDrawdown(
  solution: Pick<Solution, 'respond' | 'unknowns'>,
  parameters: number[],
  inputs: AnalysisInputs,
  noise: (index: number) => number = () => 0,
): AnalysisInputs {
  const { increments } = rateHistory(inputs.rates)
  const series = inputs.series.map((one): Series => {
    const respond = solution.respond(parameters, placeOf(one, inputs))
    const exact = drawdownHistory(respond, solution.unknowns.length, increments, one.elapsed_s)
    return { ...one, drawdown_m: exact.map((value, i) => value + noise(i)) }
  })
  return { ...inputs, series }
}

/** What a solution sees of all wells of a test. */
export function readingsOf(inputs: AnalysisInputs): SolutionReadings {
  const options = makeOptions({ wellIds: inputs.series.map(({ wellId }) => wellId) })
  const { wells } = selectReadings(inputs, options, { origin_s: 0, end_s: null, window: null })
  return { inputs, wells, history: rateHistory(inputs.rates) }
}
