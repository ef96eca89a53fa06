import { AnalysisError, type ChosenBoundary } from '../analysis.ts'
import type { Unknown } from '../method.ts'
import type { ResponsePlace } from '../place.ts'
import type { Solution, SolutionReadings } from '../solution.ts'
import { shapeStarts } from '../solutions/shape-starts.ts'
import type { Respond } from '../superposition.ts'
import { faceEachOther, imageWells, type ImageWell } from './image-wells.ts'

/** An image whose drawdown is a smaller share of the real well's, and all farther ones, change no digit. */
const NEGLIGIBLE = 1e-13
/** Step in ln of a fitted distance. */
const STEP = 1e-4

/** The solution in an aquifer with edges; a boundary without a distance adds it as an unknown. */
export function boundedSolution(solution: Solution, boundaries: readonly ChosenBoundary[]): Solution {
  if (boundaries.length === 0) return solution
  const fitted = boundaries.flatMap((boundary, i) => (boundary.distance_m === null ? [distanceTo(boundary, i)] : []))
  // Thousands of images in every step of a search would take minutes.
  if (fitted.length > 0 && faceEachOther(boundaries)) throw new AnalysisError('analysis/boundaries-facing')
  const own = solution.unknowns.length
  const bounded: Solution = {
    ...solution,
    unknowns: [...solution.unknowns, ...fitted],
    guess: (readings) => guess(solution, bounded.respond, fitted.length, readings),
    judge: (parameters, readings) => solution.judge(parameters.slice(0, own), readings),
    respond(parameters, place) {
      const direct = solution.respond(parameters, place)
      const at = (distances: number[]) => imageSum(solution, parameters, place, wellsAt(boundaries, distances))
      const distances = fitted.map((_, k) => parameters[own + k] as number)
      const images = at(distances)
      const moved = distances.map((_, k) => [at(stretched(distances, k, STEP)), at(stretched(distances, k, -STEP))])
      const scratch = new Float64Array(own + 1)
      return (time_s, out) => {
        direct(time_s, out)
        const real = out[0] as number
        images(time_s, real, scratch)
        for (let k = 0; k <= own; k++) out[k] = (out[k] as number) + (scratch[k] as number)
        moved.forEach(([farther, nearer], k) => {
          const value = (sum?: ImageSum) => (sum?.(time_s, real, scratch), scratch[0] as number)
          out[own + 1 + k] = (value(farther) - value(nearer)) / (2 * STEP)
        })
      }
    },
  }
  return bounded
}

/** Sum over the images, value and derivatives, at a time; `real` is the drawdown of the real well then. */
type ImageSum = (time_s: number, real: number, out: Float64Array) => void

function imageSum(
  { respond, unknowns }: Solution,
  parameters: ArrayLike<number>,
  place: ResponsePlace,
  images: ImageWell[],
): ImageSum {
  const { east_m, north_m } = positionOf(place)
  const ordered = images
    .map((image) => ({ sign: image.sign, distance_m: Math.hypot(image.east_m - east_m, image.north_m - north_m) }))
    .sort((one, other) => one.distance_m - other.distance_m)
  const responds: Respond[] = []
  const one = new Float64Array(unknowns.length + 1)
  return (time_s, real, out) => {
    out.fill(0)
    for (const [i, { sign, distance_m }] of ordered.entries()) {
      const atImage = (responds[i] ??= respond(parameters, { ...place, pumped: false, distance_m }))
      atImage(time_s, one)
      for (let k = 0; k < one.length; k++) out[k] = (out[k] as number) + sign * (one[k] as number)
      if (Math.abs(one[0] as number) <= NEGLIGIBLE * Math.abs(real)) return
    }
  }
}

function positionOf({ pumped, distance_m, bearing_deg }: ResponsePlace) {
  if (pumped) return { east_m: 0, north_m: 0 }
  if (bearing_deg === null) throw new AnalysisError('analysis/bearing-unknown')
  const angle = (bearing_deg * Math.PI) / 180
  return { east_m: distance_m * Math.sin(angle), north_m: distance_m * Math.cos(angle) }
}

/** Images with the fitted distances put in, in the order of the boundaries that lack one. */
function wellsAt(boundaries: readonly ChosenBoundary[], distances: number[]): ImageWell[] {
  let next = 0
  return imageWells(
    boundaries.map((boundary) => ({
      ...boundary,
      distance_m: boundary.distance_m ?? (distances[next++] as number),
    })),
  )
}

const stretched = (distances: number[], index: number, step: number) =>
  distances.map((distance, k) => (k === index ? distance * Math.exp(step) : distance))

const distanceTo = ({ kind }: ChosenBoundary, index: number): Unknown => ({
  id: `boundary_${index + 1}`,
  label: kind === 'recharge' ? 'Distance to the stream' : 'Distance to the barrier',
  dimension: 'length',
  low: 0.1,
  high: 1e6,
  scale: 'log',
})

/** Distances that are tried, in times that of the farthest well. */
const TRIED = [2, 10, 50]

/**
 * Shapes of the bounded response that come nearest to the readings. Starts of the boundless solution would not do: near
 * a stream the late slope, which they take T from, is nearly level.
 */
function guess(
  solution: Solution,
  respond: Solution['respond'],
  fitted: number,
  readings: SolutionReadings,
): number[][] {
  const farthest = Math.max(10, ...readings.wells.map(({ series }) => series.distance_m))
  const distances = fitted === 0 ? [[]] : TRIED.map((times) => new Array<number>(fitted).fill(times * farthest))
  const others = solution.guess(readings).map((start) => start.slice(2))
  const unlike = [...new Map(others.map((rest) => [rest.join(), rest])).values()]
  return shapeStarts(respond, readings, () => unlike.flatMap((rest) => distances.map((tried) => [...rest, ...tried])))
}
