import type { Finding } from './analysis.ts'
import type { ForecastPoint, ForecastRequest } from './forecast.ts'
import type { AnalysedCurve } from './forecast-uncertainty.ts'
import { THINNING_OFFERED_ABOVE, THINNING_REFUSED_ABOVE } from './unconfined.ts'

/** Beyond this many times the reach of the test a forecast is doubted (common practice). */
const FAR_BEYOND = 10
/** A band over more than this factor tells little. */
const WIDE_BAND = 10

/** What to bear in mind about a forecast, for what was asked. Severities and codes as for analyses. */
export function forecastFindings(
  analysed: AnalysedCurve,
  request: ForecastRequest,
  points: readonly ForecastPoint[],
): Finding[] {
  return [
    ...reachFindings(analysed, request),
    ...storageFindings(analysed),
    ...thinningFindings(analysed, points),
    ...bandFindings(analysed, points),
  ]
}

const beyond = (code: string, asked: number, tested: number): Finding[] =>
  asked > tested
    ? [{ code, severity: asked > FAR_BEYOND * tested ? 'caution' : 'note', params: { asked, tested } }]
    : []

function reachFindings({ inputs, result }: AnalysedCurve, { distance_m, rates, times_s }: ForecastRequest): Finding[] {
  const start = rates.find(({ rate_m3_s }) => rate_m3_s > 0)?.start_s ?? 0
  const fitted = new Set(result.residuals.map(({ wellId }) => wellId))
  const farthest = Math.max(
    ...inputs.series.filter((one) => fitted.has(one.wellId) && one.role === 'observation').map((one) => one.distance_m),
  )
  const longest = result.extras.window_to_s ?? 0
  return [
    ...beyond('forecast-longer', Math.max(...times_s) - start, longest),
    ...beyond('forecast-farther', distance_m, farthest),
  ]
}

/** Storage that a test was too short to tell grows with time. */
const storageFindings = ({ result: { storageClass } }: AnalysedCurve): Finding[] =>
  storageClass === 'apparent' ? [{ code: 'forecast-apparent-storage', severity: 'caution', params: {} }] : []

function thinningFindings(
  { inputs: { aquifer, thickness_m }, options }: AnalysedCurve,
  points: readonly ForecastPoint[],
): Finding[] {
  if (points.some(({ drawdown_m }) => drawdown_m === null))
    return [{ code: 'forecast-drained', severity: 'bad', params: { thickness_m: thickness_m ?? 0 } }]
  if (aquifer !== 'unconfined' || thickness_m === null || !(thickness_m > 0)) return []
  const share = Math.max(0, ...points.map(({ high_m }) => high_m ?? 0)) / thickness_m
  if (share > THINNING_REFUSED_ABOVE) return [{ code: 'forecast-thinning-much', severity: 'bad', params: { share } }]
  if (share > THINNING_OFFERED_ABOVE && !options.thinning)
    return [{ code: 'forecast-thinning', severity: 'caution', params: { share } }]
  return []
}

function bandFindings({ result }: AnalysedCurve, points: readonly ForecastPoint[]): Finding[] {
  const factor = Math.max(1, ...points.map(({ low_m, high_m }) => (low_m && high_m ? high_m / low_m : 1)))
  const isLoose = (result.others ?? []).some(({ determined }) => !determined)
  return [
    ...(factor > WIDE_BAND ? [{ code: 'forecast-wide', severity: 'caution' as const, params: { factor } }] : []),
    ...(isLoose ? [{ code: 'forecast-loose', severity: 'caution' as const, params: {} }] : []),
  ]
}
