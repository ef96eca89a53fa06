import type { AnalysisInputs, AnalysisOptions, Finding, FittedCurve, MethodOutcome, TimeWindow } from './analysis.ts'
import { transmissivityFromDistanceSlope } from './distance-drawdown.ts'
import { observationWells } from './distance-snapshot.ts'
import { determinationFindings, handLineFinding, rateFindings } from './findings.ts'
import { sharedOptions, transmissivity, type Method } from './method.ts'
import { parameterEstimate, UNDETERMINED_FACTOR } from './parameter-estimate.ts'
import { meanRate, rateHistory, type RateHistory } from './rates.ts'
import { largest, pumpingPhase, selectReadings } from './selection.ts'
import { steadyFinding, steadyLevels, type SteadyLevel, type SteadyLevels } from './steady-levels.ts'
import { slopeSd, straightLine, zeroAbscissa, type StraightLine } from './straight-line.ts'
import { drawnDrawdown, thinningFindings, thinningGuard } from './unconfined.ts'
import { distanceError, radiusOf } from './wells.ts'

const FEWEST_WELLS = 2
/** Without a window the wells are compared over the last half factor of ten in time. */
const WINDOW_RATIO = 10 ** 0.5

/** T = Q ln(r2/r1)/(2π(s1 − s2)). Source: Thiem 1906. */
export function thiemTransmissivity(
  rate_m3_s: number,
  near: { distance_m: number; drawdown_m: number },
  far: { distance_m: number; drawdown_m: number },
): number {
  return (rate_m3_s * Math.log(far.distance_m / near.distance_m)) / (2 * Math.PI * (near.drawdown_m - far.drawdown_m))
}

function run(inputs: AnalysisInputs, options: AnalysisOptions): MethodOutcome {
  const history = rateHistory(inputs.rates)
  const unthinned = { ...options, readingsPerCycle: null }
  const window = options.window ?? lastWindow(inputs, unthinned, history)
  const selection = selectReadings(inputs, unthinned, pumpingPhase(history, window))
  const { wells, leftOut } = observationWells(selection.wells, FEWEST_WELLS)
  const steady = steadyLevels(wells)
  thinningGuard(options, steady.to_s)
  const { levels } = steady
  const line = straightLine(logDistances(levels), drawdowns(levels), { hand: options.line ?? null, rising: false })
  const rate = meanRate(history, history.start_s + steady.to_s)
  const T = parameterEstimate(
    transmissivityFromDistanceSlope(rate, -line.slope),
    uncertaintyOf(levels, line, inputs),
    UNDETERMINED_FACTOR.T,
  )
  return {
    T,
    S: null,
    storageClass: null,
    extras: extrasOf(line, rate, steady),
    residuals: levels.map(({ well }, i) => ({
      wellId: well.series.wellId,
      elapsed_s: history.start_s + Math.sqrt(steady.from_s * steady.to_s),
      residual_m: line.residuals[i] as number,
    })),
    fit: line.summary,
    findings: [
      steadyFinding(steady),
      ...(options.line ? [handLineFinding] : []),
      ...rateFindings(history, history.start_s + steady.to_s),
      ...leakageFindings(inputs),
      ...thinningFindings(largest(levels.map(({ measured_m }) => measured_m)), inputs, options),
      ...determinationFindings({ T }),
    ],
    leftOut: [...selection.leftOut, ...leftOut],
  }
}

function lastWindow(inputs: AnalysisInputs, options: AnalysisOptions, history: RateHistory): TimeWindow | null {
  const { wells } = selectReadings(inputs, options, pumpingPhase(history, null))
  const ends = wells.flatMap(({ series, time_s }) => (series.role === 'observation' ? time_s.slice(-1) : []))
  if (ends.length === 0) return null
  const to_s = Math.min(...ends)
  return { from_s: to_s / WINDOW_RATIO, to_s }
}

/**
 * Three wells or more show by their scatter how well the line holds; of two only the scatter of their readings is
 * known. Errors of distances move the slope.
 */
function uncertaintyOf(levels: SteadyLevel[], line: StraightLine, { rateError }: AnalysisInputs) {
  const x = logDistances(levels)
  const mean = x.reduce((sum, value) => sum + value, 0) / x.length
  const squares = x.reduce((sum, value) => sum + (value - mean) ** 2, 0)
  const weights = x.map((value) => (value - mean) / squares)
  const byDistance = levels.map(({ well }, i) => {
    const moved = (line.residuals[i] as number) / squares - line.slope * (weights[i] as number)
    return (moved * distanceError(well.series)) / (Math.LN10 * line.slope)
  })
  const byReadings = Math.hypot(...levels.map(({ sd_m }, i) => ((weights[i] as number) * sd_m) / line.slope))
  const two = levels.length === 2
  return {
    fitSd: two ? byReadings : Math.abs(slopeSd(line)),
    freedom: two ? levels.reduce((sum, level) => sum + level.line.freedom, 0) : line.freedom,
    // The line through more wells holds the move of a line drawn by hand already.
    otherSd: Math.hypot(rateError, ...byDistance, two ? line.slopeShift / line.slope : 0),
  }
}

const logDistances = (levels: SteadyLevel[]) => levels.map(({ distance_m }) => Math.log10(distance_m))
const drawdowns = (levels: SteadyLevel[]) => levels.map(({ drawdown_m }) => drawdown_m)

function leakageFindings({ aquifer }: AnalysisInputs): Finding[] {
  return aquifer === 'leaky' ? [{ code: 'steady-leaky', severity: 'note', params: {} }] : []
}

function extrasOf(line: StraightLine, rate: number, { from_s, to_s }: SteadyLevels): Record<string, number> {
  return {
    slope_m: line.slope,
    intercept_m: line.intercept,
    zero_m: 10 ** zeroAbscissa(line),
    rate_m3_s: rate,
    window_from_s: from_s,
    window_to_s: to_s,
  }
}

/** The line holds for the window; before and after it says nothing. */
function curve(
  inputs: AnalysisInputs,
  options: AnalysisOptions,
  { extras }: MethodOutcome,
  times_s: number[],
): FittedCurve[] {
  const { start_s } = rateHistory(inputs.rates)
  const inWindow = (time: number) =>
    time - start_s >= (extras.window_from_s as number) && time - start_s <= (extras.window_to_s as number)
  return inputs.series
    .filter(({ wellId, role }) => options.wellIds.includes(wellId) && role === 'observation')
    .map((series) => {
      const modelled = (extras.intercept_m as number) + (extras.slope_m as number) * Math.log10(radiusOf(series))
      const drawn = drawnDrawdown(modelled, inputs, options)
      return { wellId: series.wellId, drawdown_m: times_s.map((time) => (inWindow(time) ? drawn : null)) }
    })
}

export const steadyState: Method = {
  id: 'steady-state',
  label: 'Steady state (Thiem)',
  version: 1,
  source: 'Thiem 1906',
  family: 'steady',
  aquifers: ['confined', 'leaky', 'unconfined'],
  needs: { phase: 'pumping', wells: { least: FEWEST_WELLS, most: null, roles: ['observation'] } },
  unknowns: [transmissivity],
  options: [
    sharedOptions.window,
    { name: 'line', label: 'Line drawn by hand', kind: 'line', abscissa: 'distance' },
    sharedOptions.thinning,
    sharedOptions.afterDrainage,
  ],
  validity: [
    {
      code: 'slopes-differ',
      statement: 'The levels of the wells change alike in time: their difference by at most 5 % in the window',
      source: 'Thiem 1906; common practice',
    },
    { code: 'rate-varied', statement: 'The rate stayed within 10 % of its mean', source: 'common practice' },
  ],
  run,
  curve,
}
