import { formatNumber } from '#shared/quantities/format.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'
import { distanceText } from './distances.ts'

interface Covered {
  inside: number
  n: number
  /** Mean width of the interval, log10. */
  meanWidth: number
}

const figure = (value: number) => formatNumber(value, { figures: 2, trim: true })

/** Below this many values a share would pretend to more than a count tells. */
const SHARE_FROM = 30

/** "The 95 % interval covered 94 % of 61 left-out tests; its mean width is a factor of 5.2." */
export function coverageText(level: number, { inside, n, meanWidth }: Covered): string {
  const covered = n >= SHARE_FROM ? `${Math.round((100 * inside) / n)} % of ${n}` : `${inside} of ${n}`
  return `The ${level} % interval covered ${covered} left-out tests; its mean width is a factor of ${figure(10 ** meanWidth)}.`
}

/** Bias and scatter of forecasts of left-out tests, in factors. */
export function scatterText({ meanError, rmse }: { meanError: number; rmse: number }): string {
  const bias = 10 ** Math.abs(meanError)
  const high = meanError < 0
  const biased =
    bias < 1.02
      ? 'neither high nor low on average'
      : `${high ? 'high' : 'low'} by a factor of ${figure(bias)} on average`
  return `Estimates there were ${biased}, and typically off by a factor of ${figure(10 ** rmse)}.`
}

export interface VariogramFigures {
  model: string
  nugget: number
  partialSill: number
  rangeM: number
}

/** "Spherical variogram: nugget 0.012, sill 0.098 (log10²), practical range 4.1 km." */
export function variogramText({ model, nugget, partialSill, rangeM }: VariogramFigures, units: UnitSystem): string {
  const name = model.charAt(0).toUpperCase() + model.slice(1)
  return `${name} variogram: nugget ${figure(nugget)}, sill ${figure(nugget + partialSill)} (squared log10), practical range ${distanceText(rangeM, units)}.`
}
