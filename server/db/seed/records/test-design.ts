import { theisDrawdown } from '#shared/hydraulics/theis.ts'
import type { AquiferCode } from '../fields/models.ts'
import { layerAt } from '../fields/structure.ts'
import { headAt } from '../fields/heads.ts'
import type { Truth } from '../fields/truth.ts'
import type { Point } from '../island/frame.ts'
import type { Draws } from '../random.ts'
import type { Site } from './sites.ts'
import { isDrillable } from './sites.ts'

/** What lies under a tested well and how the test was laid out, SI. */
export interface Design {
  unit: AquiferCode
  at: Point
  T: number
  /** Sy in the gravels, S elsewhere: the storage that the synthetic readings respond to. */
  storage: number
  /** Saturated thickness of the unit. */
  thickness: number
  wellRadius: number
  rate: { value: number; unit: 'L/s' | 'm3/h'; m3s: number }
  pumping_s: number
  recovery_s: number
  observations: Point[]
  /** Drawdown of the pumped well beyond the aquifer's, per (m³/s)². */
  wellLoss: number
}

const HOUR = 3_600
/** At the end of pumping the nearest observation well is to have u of about this or less. */
const END_U = 0.02
const UNITS = { 'L/s': 1e-3, 'm3/h': 1 / 3_600 } as const

export function saturatedThickness(unit: AquiferCode, [x, y]: Point): number {
  const layer = layerAt(unit, x, y)
  if (!layer) throw new RangeError('the unit is absent here')
  return Math.min(layer.top, headAt[unit](x, y)) - layer.bottom
}

function twoFigures(value: number): number {
  return Number(value.toPrecision(2))
}

/** The rate that draws the pumped well down by a few metres, as a number a field sheet would carry. */
function chooseRate(stream: Draws, T: number, storage: number, wanted: number, time: number, radius: number) {
  const perUnit = theisDrawdown(1, T, storage, radius, time)
  const m3s = Math.min(0.06, Math.max(0.0004, wanted / perUnit))
  const unit = stream.chance(0.7) ? 'L/s' : 'm3/h'
  const value = twoFigures(m3s / UNITS[unit])
  return { value, unit, m3s: value * UNITS[unit] } as const
}

function chooseObservations(stream: Draws, unit: AquiferCode, at: Point, nearest: number): Point[] {
  const count = stream.chance(0.3) ? 1 : stream.chance(0.7) ? 2 : 3
  const found: Point[] = []
  for (let tries = 0; found.length < count && tries < 400; tries++) {
    const distance = nearest * (found.length === 0 ? stream.uniform(0.35, 0.95) : stream.uniform(1.3, 2.6))
    const angle = stream.uniform(0, 2 * Math.PI)
    const place: Point = [at[0] + distance * Math.cos(angle), at[1] + distance * Math.sin(angle)]
    if (isDrillable(unit, place, 15)) found.push(place)
  }
  return found
}

/** Lays out a constant-rate test at a site: long enough and near enough for its aquifer to show. */
export function designTest(truth: Truth, stream: Draws, { unit, at }: Site): Design {
  const T = truth.at(unit, 'T', ...at)
  const storage = truth.at(unit, unit === 'TG' ? 'Sy' : 'S', ...at)
  if (T === null || storage === null) throw new RangeError('the unit is absent here')
  const thickness = saturatedThickness(unit, at)
  const hours = unit === 'TG' ? stream.pick([72, 72, 96, 120]) : stream.pick([24, 24, 36, 48, 72])
  const pumping_s = hours * HOUR
  const wellRadius = stream.pick([0.1, 0.125, 0.15])
  const wanted = unit === 'TG' ? Math.min(stream.uniform(1, 2.6), 0.16 * thickness) : stream.uniform(2, 6)
  const rate = chooseRate(stream, T, storage, wanted, pumping_s, wellRadius)
  const reach = Math.sqrt((4 * T * pumping_s * END_U) / storage)
  const nearest = Math.min(unit === 'TG' ? 60 : 220, Math.max(6, reach))
  const lossAtRate = stream.uniform(0.04, 0.3) * wanted
  return {
    unit,
    at,
    T,
    storage,
    thickness,
    wellRadius,
    rate,
    pumping_s,
    recovery_s: stream.pick([0.25, 0.5, 0.5, 1]) * pumping_s,
    observations: chooseObservations(stream, unit, at, nearest),
    wellLoss: lossAtRate / rate.m3s ** 2,
  }
}
