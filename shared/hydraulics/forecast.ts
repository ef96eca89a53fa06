import { normalQuantile } from '#shared/numerics/normal.ts'
import type { AnalysisResult, Finding, RateStep, Series } from './analysis.ts'
import { fittedCurve, methods } from './catalogue.ts'
import { forecastFindings } from './forecast-findings.ts'
import { slopesOf, unknownsCovariance, type AnalysedCurve } from './forecast-uncertainty.ts'

/** Where, when and under which pumping drawdown is asked for; rates run on a clock of their own, in its seconds. */
export interface ForecastRequest {
  distance_m: number
  /** Direction from the pumped well, degrees clockwise from north; needed where the analysis has boundaries. */
  bearing_deg?: number | null
  rates: RateStep[]
  times_s: readonly number[]
}

/** Drawdown at one time, with its 95 % band; null where the aquifer would be more than half drained. */
export interface ForecastPoint {
  time_s: number
  drawdown_m: number | null
  low_m: number | null
  high_m: number | null
}

export interface Forecast {
  points: ForecastPoint[]
  findings: Finding[]
}

/** Why an analysis gives no forecast; the sentence is in shared/words/forecast.ts. */
export type ForecastRefusal = 'no-curve' | 'no-storage' | 'not-determined'

/** A forecast needs a curve that holds at any distance and time, and T and storage that the readings determine. */
export function forecastRefusal({ method, T, S }: Pick<AnalysisResult, 'method' | 'T' | 'S'>): ForecastRefusal | null {
  if (methods[method].family !== 'curve') return 'no-curve'
  if (!S) return 'no-storage'
  return T?.determined && S.determined ? null : 'not-determined'
}

const HALF_INTERVAL = normalQuantile(0.975)
const PLACE = 'forecast'

/**
 * Drawdown in a fully penetrating piezometer at any distance and time under any rates, by the solution of an analysis.
 *
 * The 95 % band is first order in the logarithm of drawdown, so it never reaches below zero: s·exp(±1.96·σ) with σ from
 * the covariance of the fitted unknowns (`unknownsCovariance`). It holds the scatter of the test's readings, widened
 * where these are not independent, and the errors of the test's rate and distances. It does not hold: an error of the
 * rates asked for, boundaries that the test did not feel, pumping of others, recharge, change of the aquifer with
 * distance, or losses inside a pumped well. Deterministic; about 2p + 1 evaluations of the curve for p unknowns.
 * Source: superposition (Theis 1935); first-order propagation (Seber & Wild 1989, from memory).
 * @throws RangeError for a distance that is not above zero, times that are not finite, or an analysis that
 * `forecastRefusal` refuses
 * @throws AnalysisError for rates without pumping or out of order, and for a boundary without a direction
 */
export function forecastDrawdown(analysed: AnalysedCurve, request: ForecastRequest): Forecast {
  if (!(request.distance_m > 0 && Number.isFinite(request.distance_m))) throw new RangeError('No distance')
  if (request.times_s.some((time) => !Number.isFinite(time))) throw new RangeError('A time is not a number')
  const refusal = forecastRefusal(analysed.result)
  if (refusal) throw new RangeError(`No forecast: ${refusal}`)
  const { inputs, options } = elsewhere(analysed, request)
  const there = { ...analysed, inputs, options }
  const times_s = [...request.times_s]
  const curve = ({ result }: AnalysedCurve) =>
    fittedCurve(result.method, inputs, options, result, times_s)[0]?.drawdown_m ?? times_s.map(() => null)
  const drawdown = curve(there)
  const slopes = slopesOf(there, (moved) => curve(moved).map((value) => value ?? 0))
  const covariance = unknownsCovariance(analysed)
  const points = times_s.map((time_s, i) => pointOf(time_s, drawdown[i] ?? null, slopes[i] ?? [], covariance))
  return { points, findings: forecastFindings(analysed, request, points) }
}

/** The same aquifer and pumped well, with the rates asked for and one place in which nothing was measured. */
function elsewhere({ inputs, options }: AnalysedCurve, { distance_m, bearing_deg, rates }: ForecastRequest) {
  const pumped = inputs.pumpedWell ?? inputs.series.find(({ role }) => role === 'pumped')
  const place: Series = {
    wellId: PLACE,
    label: PLACE,
    role: 'observation',
    distance_m,
    distanceSd_m: 0,
    wellRadius_m: null,
    casingRadius_m: null,
    bearing_deg: bearing_deg ?? null,
    elapsed_s: [],
    drawdown_m: [],
    included: [],
  }
  // The forecast is of the pumped well alone, whoever else pumped during the test.
  const { otherWells: _others, ...own } = inputs
  return {
    inputs: { ...own, rates, series: [place], ...(pumped ? { pumpedWell: pumped } : {}) },
    options: { ...options, wellIds: [PLACE], window: null },
  }
}

function pointOf(
  time_s: number,
  drawdown_m: number | null,
  slopes: readonly number[],
  covariance: readonly (readonly number[])[],
): ForecastPoint {
  if (drawdown_m === null || !(drawdown_m > 0)) return { time_s, drawdown_m, low_m: drawdown_m, high_m: drawdown_m }
  const variance = slopes.reduce(
    (sum, a, i) => sum + slopes.reduce((inner, b, j) => inner + a * b * (covariance[i]?.[j] as number), 0),
    0,
  )
  const factor = Math.exp((HALF_INTERVAL * Math.sqrt(Math.max(0, variance))) / drawdown_m)
  return { time_s, drawdown_m, low_m: drawdown_m / factor, high_m: drawdown_m * factor }
}
