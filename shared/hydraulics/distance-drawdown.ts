import { linearRegression } from '#shared/numerics/linear-regression.ts'
import type { AnalysisInputs, AnalysisOptions, Finding, FittedCurve, MethodOutcome } from './analysis.ts'
import {
  aquiferFindings,
  determinationFindings,
  distanceFindings,
  handLineFinding,
  rateFindings,
  storageClassOf,
} from './findings.ts'
import { sharedOptions, storativity, transmissivity, type Method } from './method.ts'
import { parameterEstimate, scaledEstimate, UNDETERMINED_FACTOR, type LogUncertainty } from './parameter-estimate.ts'
import {
  drawdowns,
  logDistances,
  observationWells,
  takeSnapshot,
  type Point,
  type Snapshot,
} from './distance-snapshot.ts'
import { rateHistory } from './rates.ts'
import { largest, pumpingPhase, selectReadings } from './selection.ts'
import { LARGEST_U, smallUFinding, STRAIGHT_LINE_CONSTANT, theisU, timeOfU } from './small-u.ts'
import { slopeSd, storageSd, zeroAbscissa } from './straight-line.ts'
import { drawnDrawdown, thinningFactor, thinningFindings, thinningGuard } from './unconfined.ts'
import { distanceError, radiusOf } from './wells.ts'

/** Step in log10 of a distance for its effect on the line. */
const DISTANCE_STEP = 1e-5

/** T = ln(10)·Q/(2πΔs), Δs the drawdown per factor of ten in distance. Source: Cooper & Jacob 1946. */
export const transmissivityFromDistanceSlope = (rate_m3_s: number, slope_m: number) =>
  (Math.LN10 * rate_m3_s) / (2 * Math.PI * slope_m)

/** S = 4e^-γ·T·t/r0², r0 the distance at which the line reaches zero drawdown. Source: as above. */
export const storativityFromDistance = (T: number, time_s: number, zero_m: number) =>
  (STRAIGHT_LINE_CONSTANT * T * time_s) / zero_m ** 2

function run(inputs: AnalysisInputs, options: AnalysisOptions): MethodOutcome {
  const history = rateHistory(inputs.rates)
  const selection = selectReadings(
    inputs,
    { ...options, readingsPerCycle: null },
    pumpingPhase(history, options.window),
  )
  const { wells, leftOut } = observationWells(selection.wells)
  const snapshot = takeSnapshot(wells, history, options)
  thinningGuard(options, snapshot.time_s)
  const { T, S } = estimates(snapshot, inputs, options)
  const { points, time_s, line } = snapshot
  return {
    T,
    S,
    storageClass: storageClassOf(inputs, options, time_s),
    extras: extrasOf(snapshot),
    residuals: points.map(({ well }, i) => ({
      wellId: well.series.wellId,
      elapsed_s: history.start_s + time_s,
      residual_m: line.residuals[i] as number,
    })),
    fit: line.summary,
    findings: [
      ...smallU(snapshot, T.value, S.value),
      ...(options.line ? [handLineFinding] : []),
      ...rateFindings(history, history.start_s + time_s),
      ...aquiferFindings(inputs, options, time_s),
      ...thinningFindings(largest(points.map((point) => point.measured_m)), inputs, options),
      ...distanceFindings(wells),
      ...determinationFindings({ T, S }),
    ],
    leftOut: [...selection.leftOut, ...leftOut],
  }
}

function estimates({ points, time_s, rate, line }: Snapshot, inputs: AnalysisInputs, options: AnalysisOptions) {
  const T = transmissivityFromDistanceSlope(rate, -line.slope)
  const S = storativityFromDistance(T, time_s, 10 ** zeroAbscissa(line))
  const byDistance = distanceEffects(points)
  const uncertain = (fitSd: number, otherSd: number): LogUncertainty => ({
    fitSd,
    freedom: line.freedom,
    otherSd: Math.hypot(inputs.rateError, otherSd),
  })
  const factor = thinningFactor(
    inputs,
    options,
    points.map(({ measured_m }) => ({ measured_m: [measured_m] })),
  )
  return {
    T: parameterEstimate(T, uncertain(Math.abs(slopeSd(line)), byDistance.T), UNDETERMINED_FACTOR.T),
    S: scaledEstimate(
      parameterEstimate(S, uncertain(storageSd(line, -2), byDistance.S), UNDETERMINED_FACTOR.S),
      factor,
    ),
  }
}

/**
 * Standard deviations of ln T and ln S that come from the errors of the distances, each moved a little in turn: those of
 * least squares, for a hand draws its line at the same distances.
 */
function distanceEffects(points: Point[]): { T: number; S: number } {
  const x = logDistances(points)
  const found = linearRegression(x, drawdowns(points))
  const effects = points.map(({ well }, i) => {
    const moved = linearRegression(
      x.map((value, j) => value + (i === j ? DISTANCE_STEP : 0)),
      drawdowns(points),
    )
    const scale = distanceError(well.series) / (DISTANCE_STEP * Math.LN10)
    const logT = Math.log(found.slope / moved.slope)
    const zero = moved.intercept / moved.slope - found.intercept / found.slope
    return { T: scale * logT, S: scale * (logT + 2 * Math.LN10 * zero) }
  })
  return { T: Math.hypot(...effects.map((effect) => effect.T)), S: Math.hypot(...effects.map((effect) => effect.S)) }
}

function smallU({ points, time_s }: Snapshot, T: number, S: number): Finding[] {
  const farthest = largest(points.map((point) => point.distance_m))
  return [smallUFinding(theisU(T, S, farthest, time_s), timeOfU(T, S, farthest, LARGEST_U))]
}

function extrasOf({ line, time_s, rate }: Snapshot): Record<string, number> {
  return {
    slope_m: line.slope,
    intercept_m: line.intercept,
    zero_m: 10 ** zeroAbscissa(line),
    rate_m3_s: rate,
    time_s,
  }
}

/** The line says nothing about other moments; through T and S it becomes the straight-line drawdown of each well. */
function curve(
  inputs: AnalysisInputs,
  options: AnalysisOptions,
  { extras }: MethodOutcome,
  times_s: number[],
): FittedCurve[] {
  const { start_s, stop_s } = rateHistory(inputs.rates)
  const slope = extras.slope_m as number
  const compared_s = extras.time_s as number
  return inputs.series
    .filter(({ wellId, role }) => options.wellIds.includes(wellId) && role === 'observation')
    .map((series) => ({
      wellId: series.wellId,
      drawdown_m: times_s.map((time) => {
        if (time <= start_s || (stop_s !== null && time > stop_s)) return null
        // Drawdown per factor of ten in time is half of that in distance, which falls outwards.
        const later = (-slope / 2) * Math.log10((time - start_s) / compared_s)
        const modelled = (extras.intercept_m as number) + slope * Math.log10(radiusOf(series)) + later
        return drawnDrawdown(modelled, inputs, options)
      }),
    }))
}

export const distanceDrawdown: Method = {
  id: 'distance-drawdown',
  label: 'Distance–drawdown line (Cooper–Jacob)',
  version: 1,
  source: 'Cooper & Jacob 1946',
  family: 'line',
  aquifers: ['confined'],
  needs: { phase: 'pumping', wells: { least: 3, most: null, roles: ['observation'] } },
  unknowns: [transmissivity, storativity],
  options: [
    { name: 'time_s', label: 'Moment compared', kind: 'number', dimension: 'time', low: 0, high: 1e10, default: null },
    sharedOptions.window,
    { name: 'line', label: 'Line drawn by hand', kind: 'line', abscissa: 'distance' },
    sharedOptions.thinning,
    sharedOptions.afterDrainage,
  ],
  validity: [
    { code: 'u-large', statement: 'u = r²S/(4Tt) is at most 0.05 at the farthest well', source: 'Cooper & Jacob 1946' },
    { code: 'rate-varied', statement: 'The rate stayed within 10 % of its mean', source: 'common practice' },
  ],
  run,
  curve,
}
