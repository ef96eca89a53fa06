import type { Finding } from '#shared/hydraulics/analysis.ts'
import type { ForecastPoint, ForecastRefusal } from '#shared/hydraulics/forecast.ts'
import { methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatInterval, formatNumber, formatQuantity } from '#shared/quantities/format.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'

const refusals: Record<ForecastRefusal, string> = {
  'no-curve': 'A straight line says nothing at other distances and times. Choose an analysis by a curve.',
  'no-storage': 'This analysis gives no storativity, so there is no forecast. Choose one with an observation well.',
  'not-determined': 'T or storativity is not determined by this analysis, so there is no forecast.',
}

export const forecastRefusalText = (refusal: ForecastRefusal): string => refusals[refusal]

/** What the band holds and what it does not: beside every forecast. */
export const forecastBasis =
  'The 95 % band holds the scatter of the readings and the errors of rate and distance in the test. It does not hold boundaries that the test did not feel, pumping of others, recharge, or losses in a pumped well.'

type Params = Finding['params']
type Sentence = (params: Params, units: UnitSystem, method: MethodId) => string

const length = (params: Params, name: string, units: UnitSystem) =>
  formatQuantity(Number(params[name]), units.length, { trim: true })
const percent = (value: unknown) => `${formatNumber(100 * Number(value), { figures: 2, trim: true })} %`
const parameterName = (method: MethodId, id: unknown) =>
  methods[method].unknowns.find((unknown) => unknown.id === id)?.label ?? 'The distance to a boundary'

const sentences: Record<string, Sentence> = {
  'forecast-longer': ({ asked, tested }) =>
    `${formatElapsed(Number(asked))} of pumping is longer than the ${formatElapsed(Number(tested))} that the analysis rests on: what the test did not feel may matter by then.`,
  'forecast-farther': (params, units) =>
    `${length(params, 'asked', units)} is farther than the ${length(params, 'tested', units)} of the farthest well analysed: the aquifer may differ there.`,
  'forecast-apparent-storage': () =>
    'The storage found is apparent, because the test was too short to tell. Over a longer time drawdown grows more slowly than forecast.',
  'forecast-thinning': ({ share }) =>
    `Drawdown may reach ${percent(share)} of the saturated thickness, where thinning of the aquifer makes it larger than forecast.`,
  'forecast-thinning-much': ({ share }) =>
    `Drawdown may reach ${percent(share)} of the saturated thickness, more than half. The solution does not hold there.`,
  'forecast-drained': (params, units) =>
    `Drawdown would exceed half of the saturated thickness of ${length(params, 'thickness_m', units)}. The solution does not hold there.`,
  'forecast-wide': ({ factor }) =>
    `The band spans a factor of ${formatNumber(Number(factor), { figures: 2, trim: true })}: this analysis tells little about that place and time.`,
  'forecast-loose': ({ parameter }, _units, method) =>
    `${parameterName(method, parameter)} is not determined by the analysis, and the band is first order in it.`,
}

/** @throws RangeError for a code without a sentence */
export function forecastFindingText({ code, params }: Finding, units: UnitSystem, method: MethodId): string {
  const sentence = sentences[code]
  if (!sentence) throw new RangeError(`No sentence for the finding ${code}`)
  return sentence(params, units, method)
}

export const forecastFindingCodes = Object.keys(sentences)

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
