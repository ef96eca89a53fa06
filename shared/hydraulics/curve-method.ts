import type { LeastSquaresProblem } from '#shared/numerics/least-squares-problem.ts'
import { laidFit } from '#shared/numerics/laid-fit.ts'
import { levenbergMarquardt } from '#shared/numerics/levenberg-marquardt.ts'
import { robustLeastSquares } from '#shared/numerics/robust-least-squares.ts'
import { AnalysisError } from './analysis-error.ts'
import type { AnalysisInputs, AnalysisOptions, Finding, FittedCurve, MethodOutcome, Series } from './analysis.ts'
import { boundedSolution } from './boundaries/bounded-solution.ts'
import { casingFinding } from './casing-storage.ts'
import {
  curveCovariance,
  curveEstimate,
  curveResiduals,
  curveSummary,
  curveUncertainties,
  otherEstimates,
  type Fitted,
} from './curve-fit.ts'
import { curveProblem, placed } from './curve-problem.ts'
import {
  aquiferFindings,
  correlationFindings,
  determinationFindings,
  distanceFindings,
  fitFindings,
  pumpedStorageFinding,
  storageClassOf,
} from './findings.ts'
import { handCurveFinding, laidParameters, type CurveShift } from './laid-curve.ts'
import { sharedOptions, type Method } from './method.ts'
import { otherDrawdown, otherSources, withRateFactors, type OtherSource } from './other-wells.ts'
import { placeOf } from './place.ts'
import { rateHistory, type RateHistory } from './rates.ts'
import { chosenSeries, largest, pumpingPhase, requireReadings, selectReadings, type Selected } from './selection.ts'
import type { Solution } from './solution.ts'
import { askedSpan, drawdownHistory } from './superposition.ts'
import { drawnDrawdown, thinningFindings, thinningGuard } from './unconfined.ts'

/** A catalogue method that fits one analytical solution to any number of wells jointly, under any rate history. */
export function curveMethod(solution: Solution): Method {
  const { id, label, version, source, aquifers, known, unknowns, validity, shift } = solution
  return {
    id,
    label,
    version,
    source,
    family: 'curve',
    aquifers,
    unknowns,
    validity,
    needs: {
      phase: 'pumping',
      wells: { least: 1, most: null, roles: ['pumped', 'observation'] },
      ...(known ? { known } : {}),
    },
    options: [...curveOptions, ...(shift ? [matchOption(shift)] : [])],
    run: (inputs, options) => run(placedModel(solution, inputs, options), inputs, options),
    curve: (inputs, options, outcome, times_s) =>
      curve(placedModel(solution, inputs, options), inputs, options, outcome, times_s),
  }
}

/** A solution where the test is: with the edges of the aquifer, and with the other wells that pump. */
interface PlacedModel {
  solution: Solution
  sourcesAt: (series: Series) => OtherSource[]
}

function placedModel(solution: Solution, inputs: AnalysisInputs, { boundaries = [] }: AnalysisOptions): PlacedModel {
  const bounded = boundedSolution(solution, boundaries)
  return {
    solution: withRateFactors(bounded, inputs),
    sourcesAt: (series) => otherSources(series, { solution, inputs, boundaries, unknowns: bounded.unknowns.length }),
  }
}

const curveOptions: Method['options'] = [
  sharedOptions.window,
  {
    name: 'objective',
    label: 'Least squares of',
    kind: 'choice',
    values: ['drawdown', 'log-drawdown'],
    default: 'drawdown',
  },
  {
    name: 'weighting',
    label: 'Readings far off the curve',
    kind: 'choice',
    values: ['equal', 'huber'],
    default: 'equal',
  },
  { name: 'phase', label: 'Readings fitted', kind: 'choice', values: ['pumping', 'all'], default: 'pumping' },
  { name: 'boundaries', label: 'Streams and barriers', kind: 'boundaries', most: 2 },
  sharedOptions.thinning,
  sharedOptions.afterDrainage,
  sharedOptions.readingsPerCycle,
]

const matchOption = (shift: CurveShift): Method['options'][number] => ({
  name: 'match',
  label: 'Curve laid by hand',
  kind: 'match',
  shift,
})

function run(model: PlacedModel, inputs: AnalysisInputs, options: AnalysisOptions): MethodOutcome {
  const { solution } = model
  const history = rateHistory(inputs.rates)
  const phase = pumpingPhase(history, options.window)
  const selection = selectReadings(inputs, options, {
    ...phase,
    end_s: options.phase === 'all' ? null : phase.end_s,
    positiveOnly: options.objective === 'log-drawdown',
  })
  requireReadings(selection, solution.unknowns.length + 1)
  const wells = selection.wells.filter((well) => well.time_s.length > 0)
  const last_s = largest(wells.map((well) => well.time_s.at(-1) as number))
  thinningGuard(options, last_s)
  const fitted = fit(model, wells, history, inputs, options)
  const covariance = curveCovariance(fitted)
  const summary = curveSummary(fitted, covariance)
  const observed = wells.some(({ series }) => series.role === 'observation')
  const known = curveUncertainties(fitted, covariance)
  const storage = solution.storage ?? { unknown: 'S', storageClass: storageClassOf(inputs, options, last_s) }
  const T = curveEstimate(fitted, known, 'T')
  const S = curveEstimate(fitted, known, storage.unknown)
  const others = otherEstimates(fitted, known, ['T', storage.unknown])
  return {
    T,
    S: observed ? S : null,
    storageClass: observed ? storage.storageClass : null,
    ...(others.length > 0 ? { others } : {}),
    extras: extrasOf(fitted),
    residuals: curveResiduals(fitted),
    // Criteria for choosing among fits ask for the least squares, which a hand does not find.
    fit: options.match ? { ...summary, aicc: null } : summary,
    findings: [
      ...modelFindings(fitted, last_s),
      ...(options.match ? [handCurveFinding] : []),
      ...fitFindings(summary),
      ...determinationFindings(observed ? { T, [storage.unknown]: S } : { T }),
      ...determinationFindings(Object.fromEntries(others.map((other) => [other.id, other]))),
      ...correlationFindings(solution.unknowns, covariance.covariance),
    ],
    leftOut: selection.leftOut,
  }
}

function fit(
  { solution, sourcesAt }: PlacedModel,
  wells: Selected[],
  history: RateHistory,
  inputs: AnalysisInputs,
  options: AnalysisOptions,
): Fitted {
  const logarithmic = options.objective === 'log-drawdown'
  const places = wells.map(({ series }) => placeOf(series, inputs))
  const others = wells.map(({ series }) => sourcesAt(series))
  const problem = curveProblem(solution, placed(wells, places, others), history.increments, logarithmic)
  if (wells.every((well) => well.drawdown_m.every((value) => !(value > 0))))
    throw new AnalysisError('analysis/no-drawdown')
  try {
    const result = options.match
      ? { ...laidFit(problem, laidParameters(options.match, solution)), limit: null }
      : searched(problem, options, solution.guess({ inputs, wells, history }))
    return { inputs, options, solution, history, wells, places, others, logarithmic, problem, fit: result }
  } catch (error) {
    if (error instanceof RangeError) throw new AnalysisError('analysis/no-fit')
    throw error
  }
}

const searched = (problem: LeastSquaresProblem, { weighting }: AnalysisOptions, starts: number[][]): Fitted['fit'] =>
  weighting === 'huber'
    ? robustLeastSquares(problem, { starts })
    : { ...levenbergMarquardt(problem, { starts }), limit: null }

/** The fitted parameters beyond T and S by their id, the raw S of a pumped well for drawing, and the window used. */
function extrasOf({ solution, fit, wells }: Fitted): Record<string, number> {
  const fitted = Object.fromEntries(solution.unknowns.map(({ id }, k) => [`fitted_${id}`, fit.parameters[k] as number]))
  return {
    ...fitted,
    window_from_s: Math.min(...wells.map((well) => well.time_s[0] as number)),
    window_to_s: Math.max(...wells.map((well) => well.time_s.at(-1) as number)),
  }
}

function modelFindings({ inputs, options, solution, history, wells, fit }: Fitted, last_s: number): Finding[] {
  const pumped = wells.filter(({ series }) => series.role === 'pumped')
  const T = fit.parameters[0] as number
  return [
    ...solution.judge(fit.parameters, { inputs, wells, history }),
    ...pumped.map((well) => casingFinding(T, well.series, well.time_s[0] as number, 'drawdown')),
    ...(pumped.length === wells.length ? [pumpedStorageFinding] : []),
    ...(pumped.length > 0 && pumped.length < wells.length ? [pumpedInJointFit] : []),
    ...aquiferFindings(inputs, options, last_s, solution.aquifers),
    ...thinningFindings(largest(wells.flatMap((well) => well.measured_m)), inputs, options),
    ...distanceFindings(wells),
    ...fit.atBound.map((k) => atBound(solution.unknowns[k]?.id ?? '')),
  ]
}

/** Skin and well loss of the pumped well pull a joint fit. */
const pumpedInJointFit: Finding = { code: 'pumped-well-in-joint-fit', severity: 'caution', params: {} }
const atBound = (parameter: string): Finding => ({ code: 'at-bound', severity: 'bad', params: { parameter } })

function curve(
  { solution, sourcesAt }: PlacedModel,
  inputs: AnalysisInputs,
  options: AnalysisOptions,
  { extras }: MethodOutcome,
  times_s: number[],
): FittedCurve[] {
  const { increments } = rateHistory(inputs.rates)
  const size = solution.unknowns.length
  const parameters = solution.unknowns.map(({ id }) => extras[`fitted_${id}`] as number)
  const span = askedSpan(increments, times_s)
  return chosenSeries(inputs, options).map((series) => {
    const others = sourcesAt(series).map((source) => otherDrawdown(source, parameters, times_s))
    const respond = solution.respond(parameters, placeOf(series, inputs), span)
    const modelled = drawdownHistory(respond, size, increments, times_s, others)
    return { wellId: series.wellId, drawdown_m: modelled.map((value) => drawnDrawdown(value, inputs, options)) }
  })
}
