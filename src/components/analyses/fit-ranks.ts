import type { AnalysisOptions, AnalysisResult } from '#shared/hydraulics/analysis.ts'
import { methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { smallSampleCriterion } from '#shared/hydraulics/information-criterion.ts'

/** How far a fit is from the best of those that it may be compared with. */
export interface FitRank {
  /** AICc above the best one's, 0 for the best. */
  difference: number
  /** How many fits of the same readings there are, itself counted. */
  of: number
}

export interface RankedFit {
  key: string
  method: MethodId
  options: AnalysisOptions
  result: AnalysisResult
}

/** Only fits of the same readings by the same measure can be compared. */
function readingsOf({ options, result }: RankedFit): string {
  const { window_from_s: from_s, window_to_s: to_s } = result.extras
  return JSON.stringify([
    [...options.wellIds].sort(),
    from_s,
    to_s,
    options.objective ?? 'drawdown',
    options.weighting ?? 'equal',
    options.phase ?? 'pumping',
    options.thinning ?? false,
    result.fit.n,
  ])
}

const unknownCount = ({ extras }: AnalysisResult) =>
  Object.keys(extras).filter((name) => name.startsWith('fitted_')).length

/**
 * Differences of AICc among the curve fits of the same readings; one laid by hand is no fit. The residuals
 * of each fit tell another number of independent readings; the least of them stands for all, because values by different
 * numbers have no common scale.
 */
export function fitRanks(items: readonly RankedFit[]): Map<string, FitRank> {
  const curves = items.filter(({ method, options }) => methods[method].family === 'curve' && !options.match)
  const kinds = [...new Set(curves.map(readingsOf))]
  return new Map(kinds.flatMap((kind) => ranksOf(curves.filter((item) => readingsOf(item) === kind))))
}

function ranksOf(group: RankedFit[]): [string, FitRank][] {
  const n = Math.min(...group.map(({ result }) => result.fit.effectiveN))
  const found = group.flatMap(({ key, result }) => {
    const aicc = smallSampleCriterion(result.fit.objective / result.fit.n, n, unknownCount(result))
    return aicc === null ? [] : [{ key, aicc }]
  })
  const best = Math.min(...found.map(({ aicc }) => aicc))
  return found.map(({ key, aicc }) => [key, { difference: aicc - best, of: found.length }])
}
