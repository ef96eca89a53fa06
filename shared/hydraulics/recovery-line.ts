import { studentQuantile } from '#shared/numerics/student.ts'
import type { AnalysisOptions, Finding } from './analysis.ts'
import { volumeUntil, type RateHistory } from './rates.ts'
import { zeroAbscissa, zeroSd, type StraightLine } from './straight-line.ts'

/** S/S' between these is near enough to 1 to need no explanation (common practice). */
const RATIO_RANGE = { low: 0.5, high: 2 }

/**
 * Abscissa of the recovery plot. For one constant rate it is log10(t/t'); for a varying rate the superposition of the
 * logarithms of every step, scaled by the last rate, so that slope and formula stay the same.
 * Source: Theis 1935; ASTM D5269; superposition of the logarithmic approximation.
 */
export function recoveryAbscissa(history: RateHistory, options: AnalysisOptions, elapsed_s: number): number {
  const { stop_s, lastRate_m3_s } = history
  const since = elapsed_s - (stop_s as number)
  if (options.rateHistory === 'equivalent') {
    const pumped_s = volumeUntil(history, stop_s as number) / lastRate_m3_s
    return Math.log10((pumped_s + since) / since)
  }
  return history.increments.reduce(
    (sum, { start_s, change_m3_s }) => sum + (change_m3_s / lastRate_m3_s) * Math.log10(elapsed_s - start_s),
    0,
  )
}

export interface StorageRatio {
  value: number
  low: number
  high: number
}

/** t/t' at which the line reaches zero: S/S', 1 where storage came back as it went. Source: Theis 1935; ASTM D5269. */
export function storageRatio(line: StraightLine): StorageRatio {
  const log = zeroAbscissa(line) * Math.LN10
  const half = Math.min(studentQuantile(0.975, line.freedom) * zeroSd(line), Math.log(1e30))
  return { value: Math.exp(log), low: Math.exp(log - half), high: Math.exp(log + half) }
}

/** A ratio far from 1 is named with its likely causes, when its interval leaves 1 out. */
export function ratioFinding({ value, low, high }: StorageRatio): Finding {
  const params = { ratio: value, low, high }
  if (value > RATIO_RANGE.high && low > 1) return { code: 'recovery-ratio-high', severity: 'caution', params }
  if (value < RATIO_RANGE.low && high < 1) return { code: 'recovery-ratio-low', severity: 'caution', params }
  return { code: 'recovery-ratio-near-one', severity: 'good', params }
}
