import { exponentialIntegral, inverseExponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import { storativity, transmissivity } from './method.ts'
import type { ResponsePlace } from './place.ts'
import { meanRate } from './rates.ts'
import type { Selected } from './selection.ts'
import type { Solution, SolutionReadings } from './solution.ts'
import { theisU } from './small-u.ts'
import type { Respond } from './superposition.ts'
import { radiusOf } from './wells.ts'

/** The early part of the type curve, where S is told from T, reaches down to about this u. */
const EARLY_U = 0.1

/** Drawdown s = Q·W(u)/(4πT) of a well pumped at a constant rate in an unbounded confined aquifer. Source: Theis 1935. */
export function theisDrawdown(rate_m3_s: number, T: number, S: number, distance_m: number, time_s: number): number {
  return (rate_m3_s / (4 * Math.PI * T)) * exponentialIntegral(theisU(T, S, distance_m, time_s))
}

/** Unit-rate response with derivatives by ln T and ln S, from dW/d ln u = −e^-u. */
export function theisRespond(
  parameters: ArrayLike<number>,
  { distance_m }: Pick<ResponsePlace, 'distance_m'>,
): Respond {
  const T = parameters[0] as number
  const S = parameters[1] as number
  const factor = 1 / (4 * Math.PI * T)
  return (time_s, out) => {
    const u = theisU(T, S, distance_m, time_s)
    const W = exponentialIntegral(u)
    const decay = Math.exp(-u)
    out[0] = factor * W
    out[1] = factor * (decay - W)
    out[2] = -factor * decay
  }
}

/** Starts that all pass through the last reading of the first well: T from its late slope, and four times off it. */
function guess({ wells, history }: SolutionReadings): number[][] {
  const well = wells.find(({ time_s }) => time_s.length >= 2)
  if (!well) return [[1e-3, 1e-4]]
  const last = Math.min(well.time_s.at(-1) as number, (history.stop_s ?? Infinity) - history.start_s)
  const late_m = drawdownAt(well, last)
  const rate = meanRate(history, history.start_s + last)
  const slope = late_m - drawdownAt(well, last / 10)
  const T = (Math.LN10 * rate) / (4 * Math.PI * (slope > 0 ? slope : late_m / 5))
  return [1, 4, 0.25].map((factor) => {
    const u = inverseExponentialIntegral((4 * Math.PI * T * factor * late_m) / rate)
    return [T * factor, (4 * T * factor * last * u) / radiusOf(well.series) ** 2]
  })
}

/** Drawdown of the last reading not later than a time; the least positive drawdown before the first. */
function drawdownAt({ time_s, drawdown_m }: Selected, time: number): number {
  const later = time_s.findIndex((value) => value > time)
  const index = later === -1 ? time_s.length - 1 : later - 1
  return Math.max(drawdown_m[index] ?? 0, 1e-6)
}

function judge([T = NaN, S = NaN]: number[], { wells }: SolutionReadings) {
  const observed = wells.filter(({ series, time_s }) => series.role === 'observation' && time_s.length > 0)
  if (observed.length === 0) return []
  const u = Math.max(...observed.map(({ series, time_s }) => theisU(T, S, radiusOf(series), time_s[0] as number)))
  const params = { u, limit: EARLY_U }
  return u >= EARLY_U
    ? [{ code: 'curve-covered', severity: 'good' as const, params }]
    : [{ code: 'curve-late-only', severity: 'note' as const, params }]
}

export const theis: Solution = {
  id: 'theis',
  label: 'Confined aquifer curve (Theis)',
  version: 1,
  source: 'Theis 1935; ASTM D4106',
  aquifers: ['confined'],
  shift: { storages: ['S'] },
  unknowns: [transmissivity, storativity],
  respond: theisRespond,
  guess,
  validity: [
    {
      code: 'curve-late-only',
      statement: 'Readings begin at u of 0.1 or more, where the curve tells S from T',
      source: 'common practice',
    },
  ],
  judge,
}
