import { inverseExponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import { laplaceInverter, type TimeSpan } from '#shared/numerics/laplace-inversion.ts'
import { AnalysisError } from '../analysis-error.ts'
import type { Finding, Interval } from '../analysis.ts'
import { storativity, transmissivity, type Unknown } from '../method.ts'
import type { ResponsePlace } from '../place.ts'
import { meanRate } from '../rates.ts'
import type { Solution, SolutionReadings } from '../solution.ts'
import type { Respond } from '../superposition.ts'
import { theis, theisRespond } from '../theis.ts'
import type { OpenInterval } from '../water-table-layer.ts'
import { isWhole, waterTableTransform, type WaterTableAquifer, type WaterTablePlace } from '../water-table-transform.ts'
import { radiusOf } from '../wells.ts'

/** Drawdown in units of 1/(4πT) that rounding decides; less is given as this, so that it has a logarithm. */
const LEAST = 1e-12
const VALUES = 4

/**
 * Drawdown per unit rate in an unconfined aquifer with elastic storage and immediate drainage at the falling water
 * table, around a line sink over the open part of the pumped well, averaged over the open part at the place.
 * @returns writes value and derivatives by ln T, ln S, ln Sy and ln Kz/Kr; error ≤ 1e-6 of the value, or 1e-9/(4πT) if
 * that is more (see the tests)
 * Source: Neuman 1974; in Laplace space as Moench 1997, with a Hankel integral in place of the series of roots.
 */
export function unconfinedRespond(aquifer: WaterTableAquifer, at: WaterTablePlace, span?: TimeSpan | null): Respond {
  const { T, S } = aquifer
  const invert = laplaceInverter(waterTableTransform(aquifer, at), VALUES, { span })
  const confined = isWhole(at.source) || isWhole(at.place) ? theisRespond([T, S], at) : null
  const values = new Float64Array(VALUES)
  return (time_s, out) => {
    invert(time_s, values)
    let [value, bySy, byR, change] = [values[0], values[1], values[2], time_s * (values[3] as number)] as Numbers
    if (confined) {
      confined(time_s, out)
      const elastic = out[2] as number
      value = (out[0] as number) - value
      bySy = -bySy
      // Theis depends on r²S/t alone, so that −∂/∂ln S is ∂/∂ln t, and 2∂/∂ln S is ∂/∂ln r.
      byR = 2 * elastic - byR
      change = -elastic - change
    }
    // T·s depends on Tt, S, Sy and Kz/Kr, and on the storages as S/t and Sy/t; Kz/Kr acts as r² and as 1/storage.
    out[0] = Math.max(value, LEAST / (4 * Math.PI * T))
    out[1] = change - value
    out[2] = -change - bySy
    out[3] = bySy
    out[4] = byR / 2 + change
  }
}

type Numbers = [number, number, number, number]

function respond(parameters: ArrayLike<number>, place: ResponsePlace, span?: TimeSpan | null): Respond {
  const [T, S, Sy, anisotropy] = [0, 1, 2, 3].map((k) => parameters[k] as number) as Numbers
  const { thickness_m, distance_m, pumped, pumpedScreen, observedScreen } = place
  if (!thickness_m) throw new AnalysisError('analysis/water-table-thickness')
  const source = openInterval(pumpedScreen, thickness_m)
  const observed = pumped ? source : openInterval(observedScreen, thickness_m)
  return unconfinedRespond({ T, S, Sy, anisotropy, thickness_m }, { distance_m, source, place: observed }, span)
}

/** The open part that lies in the aquifer, from depths below its top. @throws AnalysisError when none does */
function openInterval(screen: Interval | null, thickness_m: number): OpenInterval {
  if (!screen) return { low: 0, high: 1 }
  const [low, high] = [1 - screen.bottom_m / thickness_m, 1 - screen.top_m / thickness_m]
  if (!(low <= high && low < 1 && high > 0))
    throw new AnalysisError('analysis/screen-outside', { ...screen, thickness_m })
  return { low: Math.max(0, low), high: Math.min(1, high) }
}

const specificYield: Unknown = {
  id: 'Sy',
  label: 'Specific yield',
  dimension: 'dimensionless',
  low: 1e-8,
  high: 1e3,
  scale: 'log',
}
const anisotropy: Unknown = {
  id: 'anisotropy',
  label: 'Vertical to horizontal conductivity',
  dimension: 'dimensionless',
  low: 1e-6,
  high: 1e3,
  scale: 'log',
}

/** Tt/(Sr²) up to which drawdown follows elastic storage, and Tt/(Sy·r²) from which it begins to follow the yield. */
const EARLY = 10
const LATE = 1

/** Says which limbs of the curve the readings reach: S comes from the early one, Sy from the late one. */
function judge([T = NaN, S = NaN, Sy = NaN]: number[], { wells }: SolutionReadings): Finding[] {
  const read = wells.filter(({ time_s }) => time_s.length > 0)
  const early = Math.min(...read.map(({ series, time_s }) => (T * (time_s[0] as number)) / (S * radiusOf(series) ** 2)))
  const late = Math.max(
    ...read.map(({ series, time_s }) => (T * (time_s.at(-1) as number)) / (Sy * radiusOf(series) ** 2)),
  )
  const earlyParams = { number: early, limit: EARLY }
  const lateParams = { number: late, limit: LATE }
  return [
    ...(early > EARLY ? [{ code: 'elastic-limb-missed', severity: 'note' as const, params: earlyParams }] : []),
    late < LATE
      ? { code: 'drainage-limb-missed', severity: 'caution', params: lateParams }
      : { code: 'drainage-limb-reached', severity: 'good', params: lateParams },
  ]
}

/** Storage ratios and anisotropies to begin from (common practice for sand and gravel). */
const STARTS = [
  { factor: 1, anisotropy: 0.1 },
  { factor: 1, anisotropy: 1 },
  { factor: 1, anisotropy: 0.01 },
  { factor: 0.25, anisotropy: 0.1 },
]
const YIELD_RANGE = { low: 0.01, high: 0.3 }
const LARGEST_RATIO = 0.1

/** T and Sy from the late readings as if confined, S from the first one, and several anisotropies. */
function guess(readings: SolutionReadings): number[][] {
  const [late = []] = theis.guess(readings)
  const [T = 1e-3, lateStorage = 0.1] = late
  const Sy = Math.max(YIELD_RANGE.low, Math.min(YIELD_RANGE.high, lateStorage))
  return STARTS.map(({ factor, anisotropy: share }) => {
    const S = Math.min(LARGEST_RATIO * Sy, elasticStorage(T * factor, readings))
    return [T * factor, S, Sy, share]
  })
}

/** S with which the first positive reading of the first well lies on the confined curve. */
function elasticStorage(T: number, { wells, history }: SolutionReadings): number {
  const well = wells.find(({ drawdown_m }) => drawdown_m.some((value) => value > 0))
  if (!well) return 1e-3
  const index = well.drawdown_m.findIndex((value) => value > 0)
  const [time_s, drawdown_m] = [well.time_s[index] as number, well.drawdown_m[index] as number]
  const rate = meanRate(history, history.start_s + time_s)
  const u = inverseExponentialIntegral((4 * Math.PI * T * drawdown_m) / rate)
  return (4 * T * time_s * u) / radiusOf(well.series) ** 2
}

export const unconfined: Solution = {
  id: 'unconfined',
  label: 'Unconfined aquifer with delayed response (Neuman)',
  version: 1,
  source: 'Neuman 1974; Moench 1997; ASTM D5920',
  aquifers: ['unconfined'],
  known: ['saturated-thickness'],
  storage: { unknown: 'Sy', storageClass: 'specific-yield' },
  shift: { storages: ['S', 'Sy'] },
  unknowns: [transmissivity, storativity, specificYield, anisotropy],
  respond,
  noise: 1e-9,
  guess,
  validity: [
    {
      code: 'elastic-limb-missed',
      statement: 'Readings begin before Tt/(Sr²) of 10, where drawdown follows elastic storage',
      source: 'Neuman 1975, from memory',
    },
    {
      code: 'drainage-limb-missed',
      statement: 'Readings reach Tt/(Sy·r²) of 1, where drainage begins to govern',
      source: 'Neuman 1975, from memory',
    },
  ],
  judge,
}
