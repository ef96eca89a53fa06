import type { RateHistory } from '../rates.ts'
import type { ResponsePlace } from '../place.ts'
import { placeOf } from '../place.ts'
import type { Selected } from '../selection.ts'
import type { Solution, SolutionReadings } from '../solution.ts'
import { askedSpan, drawdownHistory } from '../superposition.ts'

/** u at the last reading of the typical well, from a test that only begins to respond to one long since steady. */
const LAST_U = [3, 1, 0.3, 0.1, 0.03, 0.01, 1e-3, 1e-4, 1e-5, 1e-7]
/** Readings of each well that shapes are compared on, and how many of the best shapes are given. */
const COMPARED = 12
const STARTS = 3

interface Compared {
  place: ResponsePlace
  elapsed_s: number[]
  drawdown_m: number[]
}

/**
 * Starting points of a solution whose drawdown is 1/T times a function of S/T and its other unknowns: the shapes of a
 * coarse grid that come nearest to the readings, each with the T that fits it best (linear least squares).
 * @param others values of the unknowns beyond T and S to try, given the typical distance of the wells
 * @returns at least one start, the best first
 */
export function shapeStarts(
  respond: Solution['respond'],
  { inputs, wells, history }: SolutionReadings,
  others: (distance_m: number) => number[][],
): number[][] {
  const compared = wells
    .filter(({ time_s }) => time_s.length > 0)
    .map((well) => comparedOf(well, placeOf(well.series, inputs)))
  const distance = geometricMean(compared.map(({ place }) => place.distance_m))
  const last_s = Math.max(1, ...wells.map(({ time_s }) => time_s.at(-1) ?? 0))
  const shapes = others(distance).flatMap((rest) => LAST_U.map((u) => [1, (4 * u * last_s) / distance ** 2, ...rest]))
  const fits = shapes.flatMap((shape) => fitOf(respond, shape, compared, history))
  const best = fits.sort((a, b) => a.misfit - b.misfit).slice(0, STARTS)
  return best.length > 0 ? best.map(({ start }) => start) : [[1e-3, 1e-4, ...(others(distance)[0] ?? [])]]
}

function fitOf(respond: Solution['respond'], shape: number[], wells: Compared[], { increments }: RateHistory) {
  let [product, square, total] = [0, 0, 0]
  for (const { place, elapsed_s, drawdown_m } of wells) {
    const model = drawdownHistory(
      respond(shape, place, askedSpan(increments, elapsed_s)),
      shape.length,
      increments,
      elapsed_s,
    )
    model.forEach((value, i) => {
      const measured = drawdown_m[i] as number
      product += value * measured
      square += value * value
      total += measured * measured
    })
  }
  const amplitude = product / square
  if (!(amplitude > 0) || !Number.isFinite(amplitude)) return []
  const [, storage = 1, ...rest] = shape
  return [{ start: [1 / amplitude, storage / amplitude, ...rest], misfit: total - amplitude * product }]
}

function comparedOf({ elapsed_s, drawdown_m }: Selected, place: ResponsePlace): Compared {
  const count = Math.min(COMPARED, elapsed_s.length)
  const chosen = Array.from({ length: count }, (_, i) =>
    count === 1 ? 0 : Math.round((i * (elapsed_s.length - 1)) / (count - 1)),
  )
  return {
    place,
    elapsed_s: chosen.map((i) => elapsed_s[i] as number),
    drawdown_m: chosen.map((i) => drawdown_m[i] as number),
  }
}

const geometricMean = (values: number[]) =>
  Math.exp(values.reduce((sum, value) => sum + Math.log(value), 0) / Math.max(1, values.length))
