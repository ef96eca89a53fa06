import type { AnalysisInputs, AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import { boundedSolution } from '#shared/hydraulics/boundaries/bounded-solution.ts'
import { curveMethod } from '#shared/hydraulics/curve-method.ts'
import { makeOptions } from '../make-inputs.ts'
import { withDrawdown } from '../make-readings.ts'
import { curveTests, type CurveTest } from './curve-tests.ts'
import type { Family } from './family.ts'

const SIGMA_M = 0.01

/** The inputs with noise added to all drawdowns, series by series. */
export function withNoise(inputs: AnalysisInputs, noise: number[], sigma_m: number): AnalysisInputs {
  let from = 0
  const series = inputs.series.map((one) => {
    const first = from
    from += one.drawdown_m.length
    return { ...one, drawdown_m: one.drawdown_m.map((value, i) => value + sigma_m * (noise[first + i] as number)) }
  })
  return { ...inputs, series }
}

export const countsOf = ({ series }: AnalysisInputs) => series.map(({ elapsed_s }) => elapsed_s.length)

export const readWells = ({ series }: AnalysisInputs) =>
  series.filter(({ elapsed_s }) => elapsed_s.length > 0).map(({ wellId }) => wellId)

function curveFamily(synthetic: CurveTest): Family {
  const {
    solution,
    parameters,
    inputs,
    sigma_m = SIGMA_M,
    laplace = false,
    boundaries = [],
    oneStart = false,
  } = synthetic
  const exact = withDrawdown(boundedSolution(solution, boundaries), parameters, inputs)
  const options: AnalysisOptions = makeOptions({ wellIds: readWells(inputs), boundaries })
  const method = curveMethod(
    oneStart ? { ...solution, guess: () => [parameters.map((value) => 1.3 * value)] } : solution,
  )
  const storage = solution.unknowns.findIndex(({ id }) => id === (solution.storage?.unknown ?? 'S'))
  const [T = NaN, S = NaN] = [parameters[0], parameters[storage]]
  // Skin, whose interval is made otherwise than those on a log scale.
  const others = solution.unknowns.flatMap(({ id, scale }, k) => (scale === 'linear' ? [[id, parameters[k]]] : []))
  return {
    id: synthetic.id ?? solution.id,
    laplace,
    truth: { T, S, ...(Object.fromEntries(others) as Record<string, number>) },
    counts: countsOf(inputs),
    find: (noise) => {
      const outcome = method.run(withNoise(exact, noise, sigma_m), options)
      const further = (outcome.others ?? []).map((other) => [other.id, other] as const)
      return { ...Object.fromEntries(further), T: outcome.T, S: outcome.S }
    },
  }
}

/** One family for each solution; `dense` as in `curveTests`. */
export const curveFamilies = (dense: boolean): Family[] => curveTests(dense).map(curveFamily)
