import type { Analysis } from '#shared/contracts/analyses.ts'
import { analysisOptions } from '#shared/contracts/analysis-result.ts'
import type { AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import { rateFactorWell } from '#shared/hydraulics/other-wells.ts'
import type { Digest } from './digest.ts'

/**
 * An analysis rests on all wells of its test; its reader is told nothing of those that are hidden from them.
 * @param wells that the analysis rests on
 * @param seen ids of the test's wells that the reader may see
 */
export function withoutHiddenWells(analysis: Analysis, wells: Digest['wells'], seen: Set<string>): Analysis {
  const hidden = wells.filter(({ wellId }) => wellId !== null && !seen.has(wellId))
  if (hidden.length === 0) return analysis
  const codes = new Set<string | number>(hidden.map(({ label }) => label))
  const { options, result } = analysis
  const isNamed = (id: string) => codes.has(rateFactorWell(id) ?? '')
  const visible = ({ wellId }: { wellId: string }) => seen.has(wellId)
  return {
    ...analysis,
    options: options && withWells(analysisOptions.parse(options), seen, isNamed),
    result: {
      ...result,
      residuals: result.residuals.filter(visible),
      ...(result.residualsShown && { residualsShown: result.residualsShown.filter(visible) }),
      leftOut: result.leftOut.filter(visible),
      ...(result.others && { others: result.others.filter(({ id }) => !isNamed(id)) }),
      extras: Object.fromEntries(
        Object.entries(result.extras).filter(([name]) => !isNamed(name.replace(/^fitted_/, ''))),
      ),
      findings: result.findings.filter(
        ({ params }) => !Object.values(params).some((value) => codes.has(value) || isNamed(String(value))),
      ),
    },
  }
}

/** A curve laid by hand names the wells whose rates it multiplies. */
const withWells = (options: AnalysisOptions, seen: Set<string>, isNamed: (id: string) => boolean): AnalysisOptions => ({
  ...options,
  wellIds: options.wellIds.filter((id) => seen.has(id)),
  ...(options.match && { match: Object.fromEntries(Object.entries(options.match).filter(([id]) => !isNamed(id))) }),
})
