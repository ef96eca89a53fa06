import { VARIOGRAM_MODEL_IDS, type VariogramModelId } from './catalogue.ts'
import { GeostatisticsError } from './errors.ts'
import { diagonalOf } from './experimental.ts'
import type { KrigingData } from './kriging.ts'
import { exactLikelihood, vecchiaLikelihood, type LogLikelihood } from './likelihood.ts'
import { compassSearch, widthOfPeak, type Scored } from './search.ts'
import { totalSill, type Variogram } from './variogram.ts'

export interface VariogramNode {
  /** Share of belief; the nodes' weights sum to 1. */
  weight: number
  variogram: Variogram
}

export interface VariogramPosterior {
  /** The most likely variogram: the one to draw and to name. */
  mode: Variogram
  logLikelihood: number
  /** Variograms to average over, heaviest first. */
  nodes: VariogramNode[]
}

export interface PosteriorOptions {
  models?: readonly VariogramModelId[]
  pair?: (i: number, j: number) => boolean
  /** Values above which the likelihood is approximated; default 250. */
  exactUpTo?: number
  /** Most nodes returned; default 12. */
  maxNodes?: number
}

/** Search space: log practical range, nugget's share of the total sill, log total sill. */
interface Space {
  model: VariogramModelId
  shortest: number
  longest: number
  typicalLogSill: number
  likelihood: LogLikelihood
}

const LARGEST_NUGGET_SHARE = 0.98
const VECCHIA_NEIGHBOURS = 20
const STEPS = [0.8, 0.3, 0.4]
/** Nodes with less than 2 % of the density at the peak (e^-4) are not explored (Rue et al. 2009, 3.1). */
const DEPTH = 4
const MOST_EVALUATIONS = 150

function toVariogram(space: Space, at: readonly number[]): Variogram {
  const total = Math.exp(at[2]!)
  return { model: space.model, range: Math.exp(at[0]!), nugget: at[1]! * total, sill: (1 - at[1]!) * total }
}

/** Flat prior on log range, nugget share and log sill within bounds that the data's geometry gives. */
function scoreIn(space: Space, at: readonly number[]): number {
  const [logRange, share, logSill] = at as [number, number, number]
  const outside =
    logRange < space.shortest ||
    logRange > space.longest ||
    share < 0 ||
    share > LARGEST_NUGGET_SHARE ||
    Math.abs(logSill - space.typicalLogSill) > 4
  return outside ? -Infinity : space.likelihood(toVariogram(space, at))
}

function findPeak(space: Space): Scored {
  const score = (at: readonly number[]): number => scoreIn(space, at)
  const starts = [0.15, 0.45, 0.75].flatMap((share) =>
    [0.1, 0.5].map((nugget) => [
      space.shortest + share * (space.longest - space.shortest),
      nugget,
      space.typicalLogSill,
    ]),
  )
  const best = starts
    .map((at) => ({ at, score: score(at) }))
    .reduce((kept, next) => (next.score > kept.score ? next : kept))
  return compassSearch(score, best.at, STEPS, 0.05)
}

/** Lattice around the peak, spread from it while the density is worth having: it follows ridges and stops at bounds. */
function explore(space: Space, peak: Scored): { points: Scored[]; cell: number } {
  const score = (at: readonly number[]): number => scoreIn(space, at)
  const steps = STEPS.map((limit, axis) => widthOfPeak(score, peak, axis, 1.5, limit))
  const seen = new Set(['0,0,0'])
  const points: Scored[] = [peak]
  const queue = [[0, 0, 0]]
  for (let next = queue.shift(); next && seen.size < MOST_EVALUATIONS; next = queue.shift()) {
    for (const move of [0, 1, 2].flatMap((axis) => [1, -1].map((sign) => ({ axis, sign })))) {
      const cell = next.map((value, axis) => (axis === move.axis ? value + move.sign : value))
      if (seen.has(cell.join())) continue
      seen.add(cell.join())
      const at = cell.map((value, axis) => peak.at[axis]! + value * steps[axis]!)
      const value = score(at)
      if (value < peak.score - DEPTH) continue
      points.push({ at, score: value })
      queue.push(cell)
    }
  }
  return { points, cell: steps.reduce((product, step) => product * step, 1) }
}

/**
 * A few nodes that stand for all: systematic sampling along the total sill, which sets the width of intervals, so that
 * short and long tails both keep their due (Kitagawa 1996, systematic resampling).
 */
function representatives(nodes: VariogramNode[], most: number): VariogramNode[] {
  const sorted = [...nodes].sort((a, b) => totalSill(a.variogram) - totalSill(b.variogram))
  const total = sorted.reduce((sum, node) => sum + node.weight, 0)
  const picked = new Map<VariogramNode, number>()
  let passed = 0
  let next = 0.5
  for (const node of sorted) {
    passed += (node.weight / total) * most
    for (; next < passed && next < most; next++) picked.set(node, (picked.get(node) ?? 0) + 1 / most)
  }
  return [...picked].map(([node, weight]) => ({ ...node, weight })).sort((a, b) => b.weight - a.weight)
}

function spacesFor(data: KrigingData, options: PosteriorOptions): Space[] {
  const n = data.z.length
  const z = Array.from(data.z)
  const mean = z.reduce((sum, value) => sum + value, 0) / n
  const scatter = z.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (n - 1)
  const errors = Array.from({ length: n }, (_, i) => data.errorVariance?.[i] ?? 0).reduce((a, b) => a + b, 0) / n
  if (!(scatter > 0)) throw new GeostatisticsError('bad-input', 'all values are equal')
  const diagonal = diagonalOf(data)
  if (!(diagonal > 0)) throw new GeostatisticsError('bad-input', 'all values lie at one place')
  const exact = n <= (options.exactUpTo ?? 250) && !options.pair
  const likelihood = exact
    ? exactLikelihood(data)
    : vecchiaLikelihood(data, { neighbours: VECCHIA_NEIGHBOURS, ...(options.pair ? { pair: options.pair } : {}) })
  return (options.models ?? VARIOGRAM_MODEL_IDS).map((model) => ({
    model,
    // A fifth of the mean spacing up to the whole extent: beyond these the data cannot tell one range from another.
    shortest: Math.log((0.2 * diagonal) / Math.sqrt(n)),
    longest: Math.log(1.5 * diagonal),
    typicalLogSill: Math.log(Math.max(scatter - errors, 0.1 * scatter)),
    likelihood,
  }))
}

/**
 * Restricted maximum likelihood with its uncertainty: the most likely variogram, and a weighted set of variograms that
 * stands for all those the data allow, over families, range, nugget and sill (integration by a lattice around the peak:
 * Rue, Martino & Chopin 2009, 3.1; kriging averaged over it: Handcock & Stein 1993).
 * @throws GeostatisticsError when there are fewer than 10 values, or all are equal or in one place.
 */
export function variogramPosterior(data: KrigingData, options: PosteriorOptions = {}): VariogramPosterior {
  if (data.z.length < 10) throw new GeostatisticsError('too-few', 'a likelihood fit needs ten values')
  const peaks = spacesFor(data, options).map((space) => ({ space, peak: findPeak(space) }))
  const best = peaks.reduce((kept, next) => (next.peak.score > kept.peak.score ? next : kept))
  const nodes = peaks
    .filter(({ peak }) => peak.score > best.peak.score - DEPTH)
    .flatMap(({ space, peak }) => {
      const { points, cell } = explore(space, peak)
      return points.map(({ at, score }) => ({
        weight: Math.exp(score - best.peak.score) * cell,
        variogram: toVariogram(space, at),
      }))
    })
  return {
    mode: toVariogram(best.space, best.peak.at),
    logLikelihood: best.peak.score,
    nodes: representatives(nodes, options.maxNodes ?? 12),
  }
}
