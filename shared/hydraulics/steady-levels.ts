import { AnalysisError } from './analysis-error.ts'
import type { Finding } from './analysis.ts'
import { largest, type Selected } from './selection.ts'
import { propagated, regressionLine, type StraightLine } from './straight-line.ts'
import { radiusOf } from './wells.ts'

/** Readings of a well that its line in time needs. */
const FEWEST_READINGS = 3
/** The difference between the wells may change by this share within the window (common practice). */
export const STEADY_LIMIT = 0.05

/** One well in the window: its line in time, and its drawdown in the middle of the window. */
export interface SteadyLevel {
  well: Selected
  distance_m: number
  line: StraightLine
  drawdown_m: number
  sd_m: number
  measured_m: number
}

export interface SteadyLevels {
  levels: SteadyLevel[]
  from_s: number
  to_s: number
}

/**
 * Drawdown of every well in the middle of the window, in the logarithm of time.
 * @throws AnalysisError when a well has fewer than three readings in the window
 */
export function steadyLevels(wells: Selected[]): SteadyLevels {
  const short = wells.find(({ time_s }) => time_s.length < FEWEST_READINGS)
  if (short) {
    throw new AnalysisError('analysis/too-few-readings', { needed: FEWEST_READINGS, found: short.time_s.length })
  }
  const from_s = largest(wells.map(({ time_s }) => time_s[0] as number))
  const to_s = Math.min(...wells.map(({ time_s }) => time_s.at(-1) as number))
  if (!(to_s > from_s)) throw new AnalysisError('analysis/no-common-time', { from_s, to_s })
  const middle = Math.log10(from_s * to_s) / 2
  return { levels: wells.map((well) => levelOf(well, middle)), from_s, to_s }
}

function levelOf(well: Selected, middle: number): SteadyLevel {
  const { time_s, drawdown_m, measured_m } = well
  const line = regressionLine(
    time_s.map((time) => Math.log10(time) - middle),
    drawdown_m,
    { time_s },
  )
  return {
    well,
    distance_m: radiusOf(well.series),
    line,
    drawdown_m: line.intercept,
    sd_m: propagated(line, 1, 0),
    measured_m: largest(measured_m),
  }
}

/** Change of the largest difference between two wells within the window, as a share of that difference. */
export function differenceChange({ levels, from_s, to_s }: SteadyLevels): number {
  const nearest = levels.reduce((a, b) => (b.distance_m < a.distance_m ? b : a))
  const farthest = levels.reduce((a, b) => (b.distance_m > a.distance_m ? b : a))
  const change = (nearest.line.slope - farthest.line.slope) * Math.log10(to_s / from_s)
  return Math.abs(change / (nearest.drawdown_m - farthest.drawdown_m))
}

/** Wells whose levels move alike have reached a steady difference, whether or not they still fall. */
export function steadyFinding(steady: SteadyLevels): Finding {
  const share = differenceChange(steady)
  const equal = share <= STEADY_LIMIT
  return {
    code: equal ? 'slopes-equal' : 'slopes-differ',
    severity: equal ? 'good' : 'caution',
    params: { share, limit: STEADY_LIMIT, from_s: steady.from_s, to_s: steady.to_s },
  }
}
