import type { AnalysisInputs, Finding, Series } from './analysis.ts'
import type { Method } from './method.ts'

/** Which corrections the readings of a well were given, and what is to be borne in mind about each. */
export const correctionFindings = ({ label, corrections = [] }: Pick<Series, 'label' | 'corrections'>): Finding[] =>
  corrections.flatMap(({ kind, given, outside, record, findings }) => [
    {
      code: 'correction-applied',
      severity: 'note',
      // The figures go with the result, which is kept: later ones may differ.
      params: { ...record, given: Number(given), series: outside ?? '', well: label, correction: kind },
    },
    ...findings
      .filter(({ severity }) => severity === 'caution' || severity === 'bad')
      .map((finding) => ({ ...finding, params: { ...finding.params, well: label } })),
  ])

/** Other wells that pumped: superposed by curves, passed over by every other method. */
export function otherWellFindings(
  { family }: Pick<Method, 'family'>,
  { otherWells = [] }: AnalysisInputs,
  chosen: readonly Series[],
): Finding[] {
  const trended = chosen.some(({ corrections = [] }) => corrections.some(({ kind }) => kind === 'trend'))
  const pumpedBefore = otherWells.filter(({ rates }) => rates.some(({ start_s }) => start_s < 0))
  return [
    ...otherWells.map(({ label, fitted }): Finding =>
      family === 'curve'
        ? { code: fitted ? 'other-well-fitted' : 'other-well-superposed', severity: 'note', params: { well: label } }
        : { code: 'other-well-not-counted', severity: 'caution', params: { well: label } },
    ),
    ...(trended && family === 'curve'
      ? pumpedBefore.map(({ label }): Finding => ({
          code: 'other-well-and-trend',
          severity: 'caution',
          params: { well: label },
        }))
      : []),
  ]
}
