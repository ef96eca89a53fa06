import { AnalysisError } from './analysis-error.ts'
import type { AnalysisInputs, ChosenBoundary, OtherWell, Series } from './analysis.ts'
import { boundedSolution } from './boundaries/bounded-solution.ts'
import type { Unknown } from './method.ts'
import { placeOf, type ResponsePlace } from './place.ts'
import { rateHistory, type RateIncrement } from './rates.ts'
import type { Solution } from './solution.ts'
import { askedSpan, superpose, type AddDrawdown } from './superposition.ts'

/** Another pumping well as a place of the test feels it. */
export interface OtherSource {
  respond: Solution['respond']
  place: ResponsePlace
  increments: RateIncrement[]
  /** Moments whose mean level drawdown counts from. */
  zero_s: readonly number[]
  /** Position among the unknowns of the factor on its rates; null: rates as given. */
  factorAt: number | null
}

const PREFIX = 'rate_factor:'
/** Label of the well whose rates an unknown multiplies; null for every other unknown. */
export const rateFactorWell = (id: string): string | null => (id.startsWith(PREFIX) ? id.slice(PREFIX.length) : null)

const factorOf = ({ label }: OtherWell): Unknown => ({
  id: `${PREFIX}${label}`,
  label: `Factor on the rates of ${label}`,
  dimension: 'dimensionless',
  low: 1e-3,
  high: 1e3,
  scale: 'log',
})

const fittedOf = ({ otherWells = [] }: AnalysisInputs) => otherWells.filter(({ fitted }) => fitted)

/** The solution with one more unknown for each other well whose rates are fitted; its response stays the same. */
export function withRateFactors(solution: Solution, inputs: AnalysisInputs): Solution {
  const factors = fittedOf(inputs).map(factorOf)
  if (factors.length === 0) return solution
  const own = solution.unknowns.length
  return {
    ...solution,
    unknowns: [...solution.unknowns, ...factors],
    guess: (readings) => solution.guess(readings).map((start) => [...start, ...factors.map(() => 1)]),
    judge: (parameters, readings) => solution.judge(parameters.slice(0, own), readings),
  }
}

interface Place {
  /** The solution without boundaries and factors. */
  solution: Solution
  inputs: AnalysisInputs
  boundaries: readonly ChosenBoundary[]
  /** Unknowns before the factors. */
  unknowns: number
}

/**
 * All other wells as one well of the test feels them. They are taken to be built like the pumped well and open to the
 * whole aquifer, which matters near them only.
 * @throws AnalysisError for one beyond a boundary, or beside a boundary whose distance is to be fitted
 */
export function otherSources(series: Series, { solution, inputs, boundaries, unknowns }: Place): OtherSource[] {
  const fitted = fittedOf(inputs)
  const zero_s = zeroOf(series)
  return (inputs.otherWells ?? []).map((other) => ({
    respond: boundedSolution(solution, seenFrom(other, boundaries)).respond,
    place: placeFrom(other, series, inputs),
    increments: rateHistory(other.rates).increments,
    zero_s,
    factorAt: other.fitted ? unknowns + fitted.indexOf(other) : null,
  }))
}

/** More moments make no other mean, and cost time. */
const MOST_MOMENTS = 200

/** The same moments that the level drawdown counts from was read at: each in the middle of as many readings. */
function zeroOf({ elapsed_s, included, zero }: Series): number[] {
  const before = zero ? elapsed_s.filter((time, i) => time <= 0 && included[i]) : []
  if (before.length === 0) return [0]
  const count = Math.min(before.length, MOST_MOMENTS)
  return Array.from({ length: count }, (_, k) => before[Math.floor(((k + 0.5) * before.length) / count)] as number)
}

function placeFrom(other: OtherWell, series: Series, inputs: AnalysisInputs): ResponsePlace {
  const place = placeOf(series, inputs)
  const distance_m = other.distances.find(({ wellId }) => wellId === series.wellId)?.distance_m
  if (!distance_m) throw new AnalysisError('analysis/other-well-distance', { well: other.label, of: series.label })
  return { ...place, pumped: false, pumpedScreen: null, distance_m, bearing_deg: bearingFrom(other, place) }
}

const offset = ({ distance_m, bearing_deg }: { distance_m: number; bearing_deg: number }) => {
  const angle = (bearing_deg * Math.PI) / 180
  return { east: distance_m * Math.sin(angle), north: distance_m * Math.cos(angle) }
}

/** Direction from the other well to a place; null where the place's own direction is not known. */
function bearingFrom(other: OtherWell, { pumped, distance_m, bearing_deg }: ResponsePlace): number | null {
  if (!pumped && bearing_deg === null) return null
  const here = pumped ? { east: 0, north: 0 } : offset({ distance_m, bearing_deg: bearing_deg as number })
  const there = offset(other)
  return (Math.atan2(here.east - there.east, here.north - there.north) * 180) / Math.PI
}

/** Boundaries as they lie about the other well: as many metres nearer as it stands towards them. */
function seenFrom(other: OtherWell, boundaries: readonly ChosenBoundary[]): ChosenBoundary[] {
  const { east, north } = offset(other)
  return boundaries.map((boundary) => {
    if (boundary.distance_m === null) throw new AnalysisError('analysis/other-wells-boundary', { well: other.label })
    const towards = offset({ distance_m: 1, bearing_deg: boundary.bearing_deg })
    const distance_m = boundary.distance_m - (east * towards.east + north * towards.north)
    if (!(distance_m > 0)) throw new AnalysisError('analysis/other-well-behind', { well: other.label })
    return { ...boundary, distance_m }
  })
}

/**
 * Drawdown by another well beside what it drew when the level was read that drawdown counts from: as pumping began, or
 * on the mean of the readings before. Derivatives by the transformed unknowns, the factor on the rates on a log scale.
 * Source: superposition in a linear system (Theis 1935).
 */
export function otherDrawdown(
  { respond, place, increments, zero_s, factorAt }: OtherSource,
  parameters: ArrayLike<number>,
  times_s: readonly number[],
): AddDrawdown {
  const size = parameters.length + 1
  const [start, now, scratch] = [new Float64Array(size), new Float64Array(size), new Float64Array(size)]
  const atPlace = respond(parameters, place, askedSpan(increments, [...zero_s, ...times_s]))
  for (const moment_s of zero_s) {
    superpose(atPlace, increments, moment_s, now, scratch)
    for (let k = 0; k < size; k++) start[k] = (start[k] as number) + (now[k] as number) / zero_s.length
  }
  const factor = factorAt === null ? 1 : (parameters[factorAt] as number)
  return (elapsed_s, out) => {
    superpose(atPlace, increments, elapsed_s, now, scratch)
    for (let k = 0; k < size; k++) {
      out[k] = (out[k] as number) + factor * ((now[k] as number) - (start[k] as number))
    }
    if (factorAt !== null) out[factorAt + 1] = factor * ((now[0] as number) - (start[0] as number))
  }
}
