import type { Antecedent } from './antecedent.ts'
import type { Efficiency, Outside, Readings } from './correction.ts'
import { laggedTerm } from './lagged-response.ts'
import type { Term } from './term.ts'
import { tidesTerm } from './tides.ts'
import { trendTerm } from './trend.ts'

/** A correction that follows an outside series. */
export interface FollowingCorrection {
  kind: 'barometric' | 'gauge' | 'river'
  outside: Outside
  efficiency: Efficiency
}

/** A correction as it was asked for. */
export type WantedCorrection = { kind: 'trend'; slope_m_s: number | null } | { kind: 'tides' } | FollowingCorrection

/** Of drawdown when the outside value rises: air pressure presses the level down, a stage lifts it. */
const signs: Record<FollowingCorrection['kind'], 1 | -1> = { barometric: 1, gauge: -1, river: -1 }

/** The correction as a term of the regression. @throws AnalysisError for settings or a series that it cannot use */
export function termOf(wanted: WantedCorrection, readings: Readings, before: Antecedent): Term {
  if ('outside' in wanted) return laggedTerm({ ...wanted, sign: signs[wanted.kind] }, readings, before)
  return 'slope_m_s' in wanted ? trendTerm(before, wanted.slope_m_s) : tidesTerm(before)
}
