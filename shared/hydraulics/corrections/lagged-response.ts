import { AnalysisError, type Finding } from '../analysis.ts'
import {
  antecedentOf,
  correctionOf,
  explainedFindings,
  lengthFindings,
  type Antecedent,
  type Correction,
  type Outside,
  type Readings,
} from './correction.ts'
import { readOutside, type ReadOutside } from './outside-series.ts'
import { regression } from './regression.ts'

/** How a level follows an outside series: given, or learned from the readings before pumping. */
export type Efficiency =
  | { given: number; lag_s?: number }
  | {
      /** Longest lag tried, and the step between lags; 0 tries none. */
      longestLag_s: number
      lagStep_s: number
    }

/** Readings before pumping that a regression needs: level, trend and efficiency, and some left. */
const FEWEST_READINGS = 6

interface Learned {
  efficiency: number
  efficiencySd: number
  lag_s: number
  explained: number
}

/**
 * Takes off what an outside series moves: effect = sign·efficiency·(value(t − lag) − value(−lag)), so that the effect is
 * zero when pumping begins. The regression has a trend beside it, which would otherwise pass for efficiency.
 * @param sign of drawdown when the outside value rises: +1 for air pressure, −1 for a river's stage
 * @throws AnalysisError for a series that does not cover the readings, too few readings, or one that does not move
 */
export function removeLagged(
  id: 'barometric' | 'river',
  readings: Readings,
  outside: Outside,
  efficiency: Efficiency,
  sign: 1 | -1,
): Correction {
  const given = 'given' in efficiency
  checkEfficiency(efficiency)
  const reach = given ? (efficiency.lag_s ?? 0) : efficiency.longestLag_s
  const times = readings.elapsed_s.filter(Number.isFinite)
  const from_s = times.reduce((least, time) => Math.min(least, time), 0)
  const to_s = times.reduce((most, time) => Math.max(most, time), 0)
  const read = readOutside(outside, from_s - reach, given ? to_s - reach : to_s)
  const before = given ? null : antecedentOf(readings, FEWEST_READINGS)
  const learned = before ? learn(before, read, efficiency as LearnedFrom, sign) : null
  const used = learned ?? { efficiency: (efficiency as { given: number }).given, lag_s: reach }
  const start = read(-used.lag_s)
  return correctionOf(
    id,
    readings,
    readings.elapsed_s.map((time) => sign * used.efficiency * (read(time - used.lag_s) - start)),
    { ...used },
    [...oddFindings(used.efficiency), ...(before && learned ? learnedFindings(before, learned, reach) : [])],
  )
}

type LearnedFrom = Exclude<Efficiency, { given: number }>

function checkEfficiency(efficiency: Efficiency): void {
  if ('given' in efficiency) {
    const valid = Number.isFinite(efficiency.given) && (efficiency.lag_s ?? 0) >= 0
    if (!valid) throw new AnalysisError('analysis/bad-option', { option: 'efficiency' })
  } else if (!(efficiency.longestLag_s >= 0 && efficiency.lagStep_s > 0)) {
    throw new AnalysisError('analysis/bad-option', { option: 'lag' })
  }
}

/** The lag with the fewest squares, the efficiency by regression with a level and a trend. */
function learn(before: Antecedent, read: ReadOutside, { longestLag_s, lagStep_s }: LearnedFrom, sign: 1 | -1): Learned {
  const count = Math.floor(longestLag_s / lagStep_s + 1e-9)
  const trend = regression(
    before.elapsed_s.map((time) => [1, time]),
    before.drawdown_m,
  )
  const fits = Array.from({ length: count + 1 }, (_, k) => {
    const lag_s = k * lagStep_s
    const fit = regression(
      before.elapsed_s.map((time) => [1, time, sign * (read(time - lag_s) - read(-lag_s))]),
      before.drawdown_m,
    )
    return { lag_s, fit }
  }).filter(({ fit }) => !fit.singular)
  if (fits.length === 0) throw new AnalysisError('analysis/correction-level')
  const best = fits.reduce((a, b) => (b.fit.squares < a.fit.squares ? b : a))
  return {
    efficiency: best.fit.coefficients[2] as number,
    efficiencySd: best.fit.sd[2] as number,
    lag_s: best.lag_s,
    explained: trend.squares > 0 ? Math.max(0, 1 - best.fit.squares / trend.squares) : 0,
  }
}

function oddFindings(efficiency: number): Finding[] {
  return efficiency < 0 || efficiency > 1
    ? [{ code: 'correction-odd', severity: 'caution', params: { efficiency } }]
    : []
}

function learnedFindings(before: Antecedent, { explained, lag_s }: Learned, longest_s: number): Finding[] {
  const atEnd: Finding[] =
    lag_s > 0 && lag_s >= longest_s * (1 - 1e-9) ? [{ code: 'lag-at-end', severity: 'caution', params: { lag_s } }] : []
  return [...lengthFindings(before), ...explainedFindings(explained), ...atEnd]
}
