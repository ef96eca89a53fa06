import { lagOneAutocorrelation } from '#shared/numerics/autocorrelation.ts'
import { correlatedCovariance } from '#shared/numerics/correlated-residuals.ts'
import { invertSymmetric } from '#shared/numerics/small-matrix.ts'
import { AnalysisError } from '../analysis-error.ts'
import type { LeftOut, LeftOutReason } from '../analysis.ts'
import type { RateHistory } from '../rates.ts'
import { stepPlan, type Step, type StepPlan } from './steps.ts'
import type { StepInputs, StepOptions } from './step-test.ts'

const FEWEST_READINGS = 3
const TREND_FROM = 0.1

/** One step as the analysis sees it. */
export interface StepPoint extends Step {
  /** Drawdown that the step added, at the time of comparison, beyond the trend of the steps before. */
  increment_m: number
  /** Sum of the increments so far: the drawdown that this rate alone would have caused by that time. */
  drawdown_m: number
  /** The same per unit of rate. */
  perRate: number
}

export interface StepIncrements extends StepPlan {
  /** Steps in which water was pumped. */
  points: StepPoint[]
  /** Covariance of `perRate` between the points, from the scatter of the readings. */
  covariance: number[][]
  freedom: number
  /** Drawdown per unit of rate and factor of ten in time. */
  trend: number
  trendSd: number
  /** Trend of each step alone, with its standard deviation. */
  trends: { trend: number; sd: number }[]
  autocorrelation: number
  readings: number
  leftOut: LeftOut[]
}

interface StepReadings {
  step: Step
  time_s: number[]
  x: number[]
  drawdown_m: number[]
}

/**
 * Abscissa on which the drawdown of a step is a straight line whose slope is the same in every step: the logarithms of
 * the times since each change of rate, superposed. Its extension beyond the end of a step is the trend that would have
 * gone on without the next change. Source: Hantush 1964; superposition of the logarithmic approximation.
 */
export function trendAbscissa({ increments }: RateHistory, until_s: number, elapsed_s: number): number {
  return increments
    .filter(({ start_s }) => start_s <= until_s)
    .reduce((sum, { start_s, change_m3_s }) => sum + change_m3_s * Math.log10(elapsed_s - start_s), 0)
}

/**
 * Increments of drawdown at equal times after each change of rate, the trend of the steps before removed.
 * All steps share one trend per unit of rate, which each of them alone would know too poorly.
 * @throws AnalysisError when a step has too few readings
 * Source: Hantush 1964; Bierschenk 1963.
 */
export function stepIncrements(inputs: StepInputs, options: StepOptions): StepIncrements {
  const plan = stepPlan(inputs, options)
  const { readings, leftOut } = stepReadings(inputs, options, plan)
  const trended = commonTrend(readings)
  const logIncrement = Math.log10(plan.increment_s)
  const cumulated = readings.map(
    ({ step }, n) => (trended.heights[n] as number) + trended.trend * step.rate_m3_s * logIncrement,
  )
  const points = readings.flatMap(({ step }, n) => {
    if (!(step.rate_m3_s > 0)) return []
    const drawdown_m = cumulated[n] as number
    const increment_m = drawdown_m - (cumulated[n - 1] ?? 0)
    return [{ ...step, increment_m, drawdown_m, perRate: drawdown_m / step.rate_m3_s }]
  })
  return { ...plan, ...trended, points, covariance: perRateCovariance(readings, trended, logIncrement), leftOut }
}

function stepReadings({ well }: StepInputs, options: StepOptions, plan: StepPlan) {
  const trendFrom = options.trendFrom ?? TREND_FROM
  if (!(trendFrom >= 0 && trendFrom < 1)) throw new AnalysisError('analysis/bad-option', { option: 'trendFrom' })
  const counts = new Map<LeftOutReason, number>()
  const order = well.elapsed_s
    .map((_, i) => i)
    .sort((a, b) => (well.elapsed_s[a] as number) - (well.elapsed_s[b] as number))
  const readings = plan.steps.map((step): StepReadings => ({ step, time_s: [], x: [], drawdown_m: [] }))
  for (const i of order) {
    const time = well.elapsed_s[i] as number
    const drawdown = well.drawdown_m[i] as number
    const found = readings.find(({ step }) => time > step.from_s && time <= step.to_s)
    const reason = reasonAgainst(well.included[i] as boolean, time, drawdown, found?.step, trendFrom * plan.increment_s)
    if (reason || !found) counts.set(reason ?? 'outside-phase', (counts.get(reason ?? 'outside-phase') ?? 0) + 1)
    else {
      found.time_s.push(time)
      found.x.push(trendAbscissa(plan.history, found.step.from_s, time))
      found.drawdown_m.push(drawdown)
    }
  }
  const poor = readings.findIndex(({ time_s }) => new Set(time_s).size < FEWEST_READINGS)
  if (poor >= 0) {
    const found = readings[poor]?.time_s.length ?? 0
    throw new AnalysisError('analysis/step-readings', { step: poor + 1, needed: FEWEST_READINGS, found })
  }
  return { readings, leftOut: [...counts].map(([reason, count]) => ({ wellId: well.wellId, count, reason })) }
}

function reasonAgainst(
  included: boolean,
  time: number,
  drawdown: number,
  step: Step | undefined,
  early_s: number,
): LeftOutReason | null {
  if (!included) return 'excluded'
  if (!Number.isFinite(time) || !Number.isFinite(drawdown)) return 'not-finite'
  if (!step) return 'outside-phase'
  return time - step.from_s < early_s ? 'outside-window' : null
}

/** Least squares of one height per step and one trend, solved through the means of each step. */
function commonTrend(readings: StepReadings[]) {
  const centred = readings.map((one) => ({ ...one, ...moments(one) }))
  const sxx = sum(centred.map((one) => one.sxx))
  const trend = sum(centred.map((one) => one.sxy)) / sxx
  const heights = centred.map(({ meanX, meanY }) => meanY - trend * meanX)
  const count = sum(readings.map(({ x }) => x.length))
  const size = readings.length + 1
  const series = readings.map(({ x, drawdown_m, time_s, step }, n) => ({
    residuals: x.map((value, i) => (drawdown_m[i] as number) - (heights[n] as number) - trend * value),
    jacobian: x.flatMap((value) => [...readings.map((_, k) => (k === n ? 1 : 0)), value]),
    axes: [time_s, time_s.map((time) => Math.log(time - step.from_s))],
  }))
  const { covariance } = correlatedCovariance(series, invertSymmetric(normalMatrix(series, size)).inverse)
  return {
    trend,
    trendSd: Math.sqrt(Math.max(0, at(covariance, size - 1, size - 1))),
    heights,
    heightCovariance: covariance,
    trends: centred.map((one) => ownTrend(one)),
    autocorrelation: lagOneAutocorrelation(series.map(({ residuals }) => residuals)),
    readings: count,
    freedom: Math.max(1, count - size),
  }
}

function ownTrend({ x, drawdown_m, meanX, meanY, sxx, sxy }: StepReadings & ReturnType<typeof moments>) {
  const trend = sxy / sxx
  const squares = sum(x.map((value, i) => ((drawdown_m[i] as number) - meanY - trend * (value - meanX)) ** 2))
  return { trend, sd: Math.sqrt(squares / Math.max(1, x.length - 2) / sxx) }
}

function moments({ x, drawdown_m }: StepReadings) {
  const meanX = sum(x) / x.length
  const meanY = sum(drawdown_m) / x.length
  return {
    meanX,
    meanY,
    sxx: sum(x.map((value) => (value - meanX) ** 2)),
    sxy: sum(x.map((value, i) => (value - meanX) * ((drawdown_m[i] as number) - meanY))),
  }
}

function normalMatrix(series: { jacobian: number[] }[], size: number): number[][] {
  const normal = Array.from({ length: size }, () => new Array<number>(size).fill(0))
  for (const { jacobian } of series)
    for (let row = 0; row < jacobian.length; row += size)
      for (let i = 0; i < size; i++)
        for (let j = 0; j < size; j++)
          (normal[i] as number[])[j] = at(normal, i, j) + (jacobian[row + i] as number) * (jacobian[row + j] as number)
  return normal
}

/** perRate of a step is height/rate + trend·log Δt. */
function perRateCovariance(
  readings: StepReadings[],
  { heightCovariance }: ReturnType<typeof commonTrend>,
  logIncrement: number,
): number[][] {
  const size = readings.length
  const gradients = readings.flatMap(({ step }, n) =>
    step.rate_m3_s > 0 ? [[...readings.map((_, k) => (k === n ? 1 / step.rate_m3_s : 0)), logIncrement]] : [],
  )
  return gradients.map((a) =>
    gradients.map((b) => {
      let value = 0
      for (let i = 0; i <= size; i++)
        for (let j = 0; j <= size; j++) value += (a[i] as number) * (b[j] as number) * at(heightCovariance, i, j)
      return value
    }),
  )
}

const sum = (values: number[]) => values.reduce((total, value) => total + value, 0)
const at = (matrix: number[][], i: number, j: number) => (matrix[i] as number[])[j] as number
