import type { Draws } from '../random.ts'
import type { LogFault } from './types.ts'

export interface Reading {
  time_s: number
  /** Depth to water below the measuring point; null is written as the logger's mark for "no value". */
  depth_m: number | null
}

type Spoil = (stream: Draws, readings: readonly Reading[]) => Reading[]

const DRIFT_PER_HOUR = 0.006

/** Readings of a stretch in the middle of pumping are missing. */
const gap: Spoil = ({ uniform }, readings) => {
  const last = readings[readings.length - 1]?.time_s ?? 0
  const from = uniform(0.06, 0.12) * last
  return readings.filter(({ time_s }) => time_s < from || time_s > from * 2.2)
}

/** The probe was knocked, or read wrongly, now and then. */
const spikes: Spoil = ({ chance, uniform }, readings) =>
  readings.map((reading, i) => {
    const hit = i > 12 && reading.depth_m !== null && chance(0.025)
    return hit ? { ...reading, depth_m: reading.depth_m! + (chance(0.5) ? 1 : -1) * uniform(0.5, 1.1) } : reading
  })

const sentinel: Spoil = ({ chance }, readings) =>
  readings.map((reading, i) => (i > 10 && chance(0.03) ? { ...reading, depth_m: null } : reading))

const drift: Spoil = (_stream, readings) =>
  readings.map((reading) => ({
    ...reading,
    depth_m: reading.depth_m === null ? null : reading.depth_m + (DRIFT_PER_HOUR * Math.max(0, reading.time_s)) / 3_600,
  }))

/** A short test is short by its rate history, not by its log. */
const unspoiled: Spoil = (_stream, readings) => [...readings]

const spoilers: Record<LogFault, Spoil> = { gap, spikes, sentinel, drift, short: unspoiled }

/** What the file shows after things went wrong with the log. */
export const spoiled = (stream: Draws, faults: readonly LogFault[], readings: readonly Reading[]): Reading[] =>
  faults.reduce<Reading[]>((list, fault) => spoilers[fault](stream, list), [...readings])
