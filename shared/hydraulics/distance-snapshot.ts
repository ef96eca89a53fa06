import { AnalysisError } from './analysis-error.ts'
import type { AnalysisOptions, LeftOut } from './analysis.ts'
import { interpolated } from './interpolate.ts'
import { meanRate, type RateHistory } from './rates.ts'
import { largest, type Selected } from './selection.ts'
import { straightLine, type StraightLine } from './straight-line.ts'
import { radiusOf } from './wells.ts'

const FEWEST_WELLS = 3

/** One well at the moment compared. */
export interface Point {
  well: Selected
  distance_m: number
  drawdown_m: number
  measured_m: number
}

/** All wells at one moment, with the line through them. */
export interface Snapshot {
  points: Point[]
  time_s: number
  rate: number
  line: StraightLine
}

/** Observation wells with readings; the pumped well is left out because its well loss does not lie on the line. */
export function observationWells(
  selected: Selected[],
  fewest = FEWEST_WELLS,
): { wells: Selected[]; leftOut: LeftOut[] } {
  const pumped = selected.filter(({ series }) => series.role === 'pumped')
  const wells = selected.filter(({ series, time_s }) => series.role === 'observation' && time_s.length > 0)
  if (wells.length < fewest) {
    throw new AnalysisError('analysis/too-few-wells', { needed: fewest, found: wells.length })
  }
  const distances = wells.map(({ series }) => radiusOf(series))
  if (distances.every((distance) => distance === distances[0])) throw new AnalysisError('analysis/distances-equal')
  return {
    wells,
    leftOut: pumped.map(({ series, time_s }) => ({
      wellId: series.wellId,
      count: time_s.length,
      reason: 'pumped-well' as const,
    })),
  }
}

export function takeSnapshot(wells: Selected[], history: RateHistory, options: AnalysisOptions): Snapshot {
  const from = largest(wells.map((well) => well.time_s[0] as number))
  const to = Math.min(...wells.map((well) => well.time_s.at(-1) as number))
  const time_s = options.time_s == null ? to : options.time_s - history.start_s
  if (!(time_s >= from && time_s <= to)) {
    throw new AnalysisError('analysis/no-common-time', { from_s: from, to_s: to, time_s })
  }
  const points = wells.map((well) => ({
    well,
    distance_m: radiusOf(well.series),
    drawdown_m: interpolated(well.time_s, well.drawdown_m, time_s),
    measured_m: interpolated(well.time_s, well.measured_m, time_s),
  }))
  const line = straightLine(logDistances(points), drawdowns(points), {
    hand: options.line ?? null,
    rising: false,
  })
  return { points, time_s, rate: meanRate(history, history.start_s + time_s), line }
}

export const logDistances = (points: Point[]) => points.map((point) => Math.log10(point.distance_m))
export const drawdowns = (points: Point[]) => points.map((point) => point.drawdown_m)
