import { choleskyInPlace, dot, forwardSolve, logDeterminant } from './cholesky.ts'
import type { KrigingData } from './kriging.ts'
import { krigingGeometry, observationCovariance } from './kriging.ts'
import type { Variogram } from './variogram.ts'

/** Restricted log likelihood of a variogram, without its constant; -Infinity where the covariance is singular. */
export type LogLikelihood = (v: Variogram) => number

/** What a block of values says about the mean: the generalised sums of squares that both routes below add up. */
interface Sums {
  logDeterminant: number
  zz: number
  z1: number
  one: number
}

/** Patterson & Thompson 1971; Cressie 1993, 2.6: the constant mean is integrated out. */
const restricted = ({ logDeterminant: log, zz, z1, one }: Sums): number =>
  -0.5 * (log + Math.log(one) + zz - (z1 * z1) / one)

/** Exact, by one Cholesky factor of all values: time grows with the cube of their number. */
export function exactLikelihood(data: KrigingData): LogLikelihood {
  const n = data.z.length
  const geometry = krigingGeometry({ x: 0, y: 0 }, data.x, data.y)
  return (v) => {
    const l = observationCovariance(geometry, v, data.errorVariance, false)
    if (!choleskyInPlace(l, n)) return -Infinity
    const z = Float64Array.from(data.z)
    const one = new Float64Array(n).fill(1)
    forwardSolve(l, n, z)
    forwardSolve(l, n, one)
    return restricted({
      logDeterminant: logDeterminant(l, n),
      zz: dot(z, z, n),
      z1: dot(z, one, n),
      one: dot(one, one, n),
    })
  }
}

/** A fixed shuffle: neighbours among earlier values then lie near and far, which the approximation needs. */
function scrambled(n: number): number[] {
  const key = (i: number): number => (Math.imul(i + 1, 0x9e3779b1) ^ (Math.imul(i + 1, 0x85ebca6b) >>> 13)) >>> 0
  return Array.from({ length: n }, (_, i) => i).sort((a, b) => key(a) - key(b) || a - b)
}

interface Conditional {
  index: number
  given: number[]
  /** Lower triangle of the distances among `given` followed by the value itself. */
  geometry: { n: number; between: Float64Array }
}

function nearestEarlier(data: KrigingData, earlier: number[], i: number, options: VecchiaOptions): number[] {
  const squared = (j: number): number => (data.x[i]! - data.x[j]!) ** 2 + (data.y[i]! - data.y[j]!) ** 2
  const open = options.pair ? earlier.filter((j) => options.pair!(i, j)) : earlier
  return open
    .map((j) => [squared(j), j] as const)
    .sort((a, b) => a[0] - b[0] || a[1] - b[1])
    .slice(0, options.neighbours)
    .map(([, j]) => j)
}

function conditionals(data: KrigingData, options: VecchiaOptions): Conditional[] {
  const order = scrambled(data.z.length)
  return order.map((index, position) => {
    const given = nearestEarlier(data, order.slice(0, position), index, options)
    const members = [...given, index]
    const at = (v: ArrayLike<number>): number[] => members.map((i) => v[i]!)
    const { n, between } = krigingGeometry({ x: 0, y: 0 }, at(data.x), at(data.y))
    return { index, given, geometry: { n, between } }
  })
}

function addConditional(sums: Sums, c: Conditional, data: KrigingData, v: Variogram): boolean {
  const { n } = c.geometry
  const members = [...c.given, c.index]
  const errors = members.map((i) => data.errorVariance?.[i] ?? 0)
  const l = observationCovariance(c.geometry, v, errors, false)
  if (!choleskyInPlace(l, n)) return false
  // The last row of the factor holds the conditional distribution: its whitened residual is the last of L⁻¹z.
  const z = Float64Array.from(members, (i) => data.z[i]!)
  const one = new Float64Array(n).fill(1)
  forwardSolve(l, n, z)
  forwardSolve(l, n, one)
  sums.logDeterminant += 2 * Math.log(l[n * n - 1]!)
  sums.zz += z[n - 1]! ** 2
  sums.z1 += z[n - 1]! * one[n - 1]!
  sums.one += one[n - 1]! ** 2
  return true
}

export interface VecchiaOptions {
  /** Earlier values each value is conditioned on; exact when it is the number of values. */
  neighbours: number
  /** Pairs for which this says false inform each other not at all (across a barrier). */
  pair?: (i: number, j: number) => boolean
}

/**
 * Approximation for many values, or with barriers: a product of conditional densities given the nearest earlier values
 * (Vecchia 1988; Stein, Chi & Welty 2004 for the restricted form). Time grows with the number of values.
 */
export function vecchiaLikelihood(data: KrigingData, options: VecchiaOptions): LogLikelihood {
  const parts = conditionals(data, options)
  return (v) => {
    const sums = { logDeterminant: 0, zz: 0, z1: 0, one: 0 }
    return parts.every((part) => addConditional(sums, part, data, v)) ? restricted(sums) : -Infinity
  }
}
