import type { TimeSpan } from '#shared/numerics/laplace-inversion.ts'
import { AnalysisError } from '../analysis-error.ts'
import type { ChosenBoundary } from '../analysis.ts'
import type { Unknown } from '../method.ts'
import type { ResponsePlace } from '../place.ts'
import type { Solution, SolutionReadings } from '../solution.ts'
import { shapeStarts } from '../solutions/shape-starts.ts'
import type { Respond } from '../superposition.ts'
import { faceEachOther, imageRows, type ImageRow } from './image-wells.ts'
import { rowPoints } from './parallel-images.ts'

/** An image whose drawdown is a smaller share of the real well's, and all farther ones, change no digit. */
const ROUNDING = 1e-13
/** Step in ln of a fitted distance. */
const STEP = 1e-4

/** The solution in an aquifer with edges; a boundary without a distance adds it as an unknown. */
export function boundedSolution(solution: Solution, boundaries: readonly ChosenBoundary[]): Solution {
  if (boundaries.length === 0) return solution
  const fitted = boundaries.flatMap((boundary, i) => (boundary.distance_m === null ? [distanceTo(boundary, i)] : []))
  // Inversions for a hundred images in every step of a search would take minutes.
  if (fitted.length > 0 && solution.noise !== undefined && faceEachOther(boundaries))
    throw new AnalysisError('analysis/boundaries-facing')
  const own = solution.unknowns.length
  const bounded: Solution = {
    ...solution,
    unknowns: [...solution.unknowns, ...fitted],
    guess: (readings) => guess(solution, bounded.respond, fitted.length, readings),
    judge: (parameters, readings) => solution.judge(parameters.slice(0, own), readings),
    respond(parameters, place, span) {
      const direct = solution.respond(parameters, place, span)
      const at = (distances: number[]) => imageSum(solution, parameters, place, rowsAt(boundaries, distances), span)
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
  { respond, unknowns, noise = ROUNDING }: Solution,
  parameters: ArrayLike<number>,
  place: ResponsePlace,
  rows: ImageRow[],
  span: TimeSpan | null | undefined,
): ImageSum {
  const ordered = rows
    .map((row) => ({
      images: imagesOf(row, place),
      count: row.step ? rowPoints().length : 1,
      responds: [] as Respond[],
    }))
    .sort((one, other) => one.images(0).distance_m - other.images(0).distance_m)
  const one = new Float64Array(unknowns.length + 1)
  return (time_s, real, out) => {
    out.fill(0)
    for (const { images, count, responds } of ordered) {
      for (let j = 0; j < count; j++) {
        const { weight, distance_m } = images(j)
        const atImage = (responds[j] ??= respond(parameters, { ...place, pumped: false, distance_m }, span))
        atImage(time_s, one)
        for (let k = 0; k < one.length; k++) out[k] = (out[k] as number) + weight * (one[k] as number)
        if (Math.abs(weight * (one[0] as number)) > noise * Math.abs(real)) continue
        if (j === 0) return
        break
      }
    }
  }
}

/** Images of a row, nearest first: what each counts for and how far it is from a place. */
function imagesOf({ east_m, north_m, sign, step }: ImageRow, place: ResponsePlace) {
  const at = positionOf(place)
  const points = rowPoints()
  return (index: number) => {
    const { n, weight } = points[index] as (typeof points)[number]
    const [east, north] = step ? [east_m + n * step.east_m, north_m + n * step.north_m] : [east_m, north_m]
    return { weight: sign * weight, distance_m: Math.hypot(east - at.east_m, north - at.north_m) }
  }
}

function positionOf({ pumped, distance_m, bearing_deg }: ResponsePlace) {
  if (pumped) return { east_m: 0, north_m: 0 }
  if (bearing_deg === null) throw new AnalysisError('analysis/bearing-unknown')
  const angle = (bearing_deg * Math.PI) / 180
  return { east_m: distance_m * Math.sin(angle), north_m: distance_m * Math.cos(angle) }
}

/** Images with the fitted distances put in, in the order of the boundaries that lack one. */
function rowsAt(boundaries: readonly ChosenBoundary[], distances: number[]): ImageRow[] {
  let next = 0
  return imageRows(
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
  const distances = Array.from({ length: fitted }).reduce<number[][]>(
    (known) => known.flatMap((some) => TRIED.map((times) => [...some, times * farthest])),
    [[]],
  )
  const others = solution.guess(readings).map((start) => start.slice(2))
  const unlike = [...new Map(others.map((rest) => [rest.join(), rest])).values()]
  return shapeStarts(respond, readings, () => unlike.flatMap((rest) => distances.map((tried) => [...rest, ...tried])))
}
