import type { EfficiencySettings } from '#shared/contracts/corrections.ts'
import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import type { WantedCorrection } from '#shared/hydraulics/corrections/catalogue.ts'
import { correctReadings } from '#shared/hydraulics/corrections/correct-readings.ts'
import type { AppliedCorrection, Efficiency, Readings } from '#shared/hydraulics/corrections/correction.ts'
import type { CorrectionParts } from '../corrections/corrections.service.ts'

interface Named {
  wanted: WantedCorrection
  outside: string | null
}

const efficiencyOf = (settings: EfficiencySettings): Efficiency =>
  settings.from === 'given'
    ? { given: settings.value, lag_s: settings.lagS }
    : { longestLag_s: settings.longestLagS, lagStep_s: settings.lagStepS }

/** Corrections of one well, as they are asked of its readings. */
function wantedFor(wellId: number, { corrections, outside }: CorrectionParts): Named[] {
  return corrections
    .filter(({ wellIds }) => wellIds === null || wellIds.includes(wellId))
    .map(({ settings }): Named => {
      if (!('seriesId' in settings)) {
        const { kind } = settings
        return {
          wanted: kind === 'trend' ? { kind, slope_m_s: settings.slopeMPerS } : { kind },
          outside: null,
        }
      }
      const followed = outside.get(settings.seriesId) ?? { label: '', elapsed_s: [], value_m: [] }
      const { kind, efficiency } = settings
      return { wanted: { kind, outside: followed, efficiency: efficiencyOf(efficiency) }, outside: followed.label }
    })
}

export interface CorrectedLog {
  drawdown_m: number[]
  applied: AppliedCorrection[]
}

/** Readings of one well after its corrections, or why they cannot be corrected; null where nothing is asked. */
export function correctedLog(
  wellId: number,
  parts: CorrectionParts,
  readings: Readings,
  meanBefore: boolean,
): CorrectedLog | { code: string; params: Record<string, string | number> } | null {
  const named = wantedFor(wellId, parts)
  if (named.length === 0) return null
  try {
    const { drawdown_m, corrections } = correctReadings(
      readings,
      named.map(({ wanted }) => wanted),
      { meanBefore },
    )
    return {
      drawdown_m,
      applied: corrections.map(({ kind, given, record, findings }, i) => ({
        kind,
        given,
        outside: named[i]!.outside,
        record,
        findings,
      })),
    }
  } catch (error) {
    if (error instanceof AnalysisError) return { code: error.code, params: error.params }
    throw error
  }
}
