import type { ForecastPoint, ForecastRefusal } from '#shared/hydraulics/forecast.ts'
import { formatInterval, formatQuantity } from '#shared/quantities/format.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'
import type { Sentences } from './findings.ts'

const refusals: Record<ForecastRefusal, string> = {
  'no-curve': 'A straight line says nothing at other distances and times. Choose an analysis by a curve.',
  'no-storage': 'This analysis gives no storativity, so there is no forecast. Choose one with an observation well.',
  'not-determined': 'T or storativity is not determined by this analysis, so there is no forecast.',
}

export const forecastRefusalText = (refusal: ForecastRefusal): string => refusals[refusal]

/** What the band holds and what it does not: beside every forecast. */
export const forecastBasis =
  'The 95 % band holds the scatter of the readings and the errors of rate and distance in the test. It does not hold boundaries that the test did not feel, pumping of others, recharge, or losses in a pumped well.'

/** What to bear in mind about a forecast. */
export const forecastFindings: Sentences<string> = {
  'forecast-longer': ({ span }) =>
    `${span('asked')} of pumping is longer than the ${span('tested')} that the analysis rests on: what the test did not feel may matter by then.`,
  'forecast-farther': ({ length }) =>
    `${length('asked')} is farther than the ${length('tested')} of the farthest well analysed: the aquifer may differ there.`,
  'forecast-apparent-storage': () =>
    'The storage found is apparent, because the test was too short to tell. Over a longer time drawdown grows more slowly than forecast.',
  'forecast-thinning': ({ percent }) =>
    `Drawdown may reach ${percent('share')} of the saturated thickness, where thinning of the aquifer makes it larger than forecast.`,
  'forecast-thinning-much': ({ percent }) =>
    `Drawdown may reach ${percent('share')} of the saturated thickness, more than half. The solution does not hold there.`,
  'forecast-drained': ({ length }) =>
    `Drawdown would exceed half of the saturated thickness of ${length('thickness_m')}. The solution does not hold there.`,
  'forecast-wide': ({ number }) =>
    `The band spans a factor of ${number('factor')}: this analysis tells little about that place and time.`,
  'forecast-loose': () =>
    'A quantity of the solution beside T and S is not determined by the analysis, and the band is first order in it.',
}

/** Drawdown below this is as none: no level is read finer. */
const READABLE_M = 0.001

export interface DrawdownText {
  value: string
  band: string
}

/** A forecast drawdown and its band in the reader's units. */
export function drawdownText({ drawdown_m, low_m, high_m }: ForecastPoint, { length: unit }: UnitSystem): DrawdownText {
  if (drawdown_m === null || low_m === null || high_m === null) return { value: 'beyond the solution', band: '–' }
  if (high_m < READABLE_M) return { value: `less than ${formatQuantity(READABLE_M, unit)}`, band: '–' }
  return {
    value: formatQuantity(drawdown_m, unit, { figures: 2 }),
    band: formatInterval(low_m, high_m, unit, { figures: 2 }),
  }
}
