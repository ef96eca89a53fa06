import type { Analysis } from '#shared/contracts/analyses.ts'
import type { AnalysisOptions, Finding, OtherEstimate } from '#shared/hydraulics/analysis.ts'
import { isOwnKind, kindOfMethod, methodsOf, type OwnKindId } from '#shared/hydraulics/any-kind.ts'
import { methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import type { ValidityRule } from '#shared/hydraulics/method.ts'
import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatNumber, formatQuantity } from '#shared/quantities/format.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'
import { dimensions, type Dimension } from '#shared/quantities/units.ts'
import { estimateInterval, estimateText } from '../estimate-text.ts'
import { evidenceText } from '../evidence.ts'
import { findingText } from '../findings.ts'
import { foundQuantity } from '../found-quantities.ts'
import { methodLabel } from '../methods.ts'
import { quantityName } from '../values.ts'
import { reportDate } from './dates.ts'
import type { ReportBlock, ReportFact, ReportGiven, ReportMark, ReportSection } from './document.ts'

export const stateWords: Record<Analysis['state'], string> = {
  draft: 'Draft, not reviewed',
  submitted: 'Waits for review',
  accepted: 'Accepted',
  returned: 'Returned by the reviewer',
  withdrawn: 'Withdrawn',
}
const severityWords: Record<Finding['severity'], string> = {
  good: 'Good',
  note: 'Note',
  caution: 'Caution',
  bad: 'Problem',
}
const order: Record<Finding['severity'], number> = { bad: 0, caution: 1, note: 2, good: 3 }

const isConstantRate = (method: string): method is MethodId => Object.hasOwn(methods, method)

interface Described {
  source: string
  validity: readonly ValidityRule[]
}

/** What the catalogues say of a method; nothing of a value that was only reported. */
function describedMethod(method: string): Described {
  if (isConstantRate(method)) return methods[method]
  const kind = kindOfMethod(method)
  return (isOwnKind(kind) ? methodsOf(kind)[method] : undefined) ?? { source: '', validity: [] }
}

/** "Recovery (Theis), late window". */
export const analysisName = ({ method, label }: Pick<Analysis, 'method' | 'label'>): string =>
  label ? `${methodLabel(method)}: ${label}` : methodLabel(method)

export function analysisSection(analysis: Analysis, given: ReportGiven): ReportSection {
  const { units } = given
  const { validity } = describedMethod(analysis.method)
  const { findings } = analysis.result
  return {
    id: `analysis-${analysis.id}`,
    title: analysisName(analysis),
    blocks: [
      { kind: 'facts', facts: analysisFacts(analysis, given) },
      ...(analysis.inputsChanged ? [changedInputs] : []),
      ...(analysis.rationale ? [{ kind: 'text' as const, text: analysis.rationale }] : []),
      ...plotBlock(analysis, given),
      resultsTable(analysis, units),
      ...(validity.length > 0 ? [validityTable(validity, findings, units)] : []),
      ...marks(analysis, units),
      ...reviewsTable(analysis),
    ],
  }
}

const changedInputs: ReportBlock = {
  kind: 'marked',
  items: [
    {
      severity: 'caution',
      word: severityWords.caution,
      text: 'Readings, rates or distances of the test were changed after this analysis: its numbers are those of then, and its plot shows them on the data of now.',
    },
  ],
}

const kindCaptions: Record<OwnKindId, string> = {
  step: 'Drawdown over rate of each step, and the losses fitted to it',
  slug: 'Head over first displacement, and what was fitted to it',
  'specific-capacity': 'Transmissivity for the storativity assumed, and for others',
}

function plotBlock({ id, method }: Analysis, { snapshot }: ReportGiven): ReportBlock[] {
  const plot = (caption: string): ReportBlock[] => [{ kind: 'plot', analysisId: id, caption }]
  if ('kind' in snapshot) return kindOfMethod(method) === snapshot.kind ? plot(kindCaptions[snapshot.kind]) : []
  return isConstantRate(method) && snapshot.inputs.series.length > 0
    ? plot('Readings, fitted curve with its 95 % band, and residuals')
    : []
}

function analysisFacts(analysis: Analysis, given: ReportGiven): ReportFact[] {
  const { source } = describedMethod(analysis.method)
  const { fit } = analysis.result
  return [
    { label: 'State', text: stateWords[analysis.state] },
    { label: 'Method', text: `${methodLabel(analysis.method)}, version ${analysis.methodVersion}` },
    ...(source ? [{ label: 'Source', text: source }] : []),
    ...wellsFact(analysis, given),
    ...(isConstantRate(analysis.method) ? [{ label: 'Readings used', text: windowText(analysis) }] : []),
    ...(fit.n > 0
      ? [
          {
            label: 'Fit',
            text: `${fit.n} readings, worth ${formatNumber(fit.effectiveN, { figures: 2, trim: true })} independent ones; root mean square residual ${formatQuantity(fit.rmse_m, given.units.length, { figures: 2 })}`,
          },
        ]
      : []),
    {
      label: 'Analysed by',
      text: [analysis.createdBy?.name, reportDate(analysis.submittedAt ?? analysis.createdAt)]
        .filter(Boolean)
        .join(', '),
    },
  ]
}

function wellsFact({ options }: Analysis, { test }: ReportGiven): ReportFact[] {
  if (!options || !('wellIds' in options)) return []
  const codes = options.wellIds.map((id) => test.wells.find(({ wellId }) => String(wellId) === id)?.code ?? 'a well')
  return [{ label: codes.length === 1 ? 'Well' : 'Wells', text: codes.join(', ') }]
}

function windowText({ options, result: { extras } }: Analysis): string {
  const { window_from_s: from_s, window_to_s: to_s } = extras
  const proposed = from_s !== undefined && to_s !== undefined ? { from_s, to_s } : null
  const window = (options && 'window' in options ? options.window : null) ?? proposed
  return window ? `from ${formatElapsed(window.from_s)} to ${formatElapsed(window.to_s)}` : 'all'
}

function resultsTable({ method, options, result }: Analysis, units: UnitSystem): ReportBlock {
  const storage = quantityName({ quantity: 'S', storageClass: result.storageClass })
  const row = (name: string, estimate: Omit<OtherEstimate, 'id'>, dimension: Dimension) => [
    name,
    estimateText(estimate, units[dimension]),
    estimateInterval(estimate, units[dimension]),
  ]
  const rows = [
    ...(result.T ? [row('Transmissivity', result.T, 'transmissivity')] : []),
    ...(result.S ? [row(storage, result.S, 'storage')] : []),
    ...(result.K ? [row('Hydraulic conductivity', result.K, 'conductivity')] : []),
    ...(result.others ?? []).map((other) => {
      const { name, dimension, unit } = otherQuantity(method, other.id, options as AnalysisOptions | null)
      const [, value = '', interval = ''] = row(name, other, dimension)
      return [name, `${value}${unit}`, `${interval}${unit}`]
    }),
  ]
  return { kind: 'table', caption: 'Results', head: ['Quantity', 'Value', '95 % interval'], rows }
}

/** A quantity of a kind of its own may carry a unit that the catalogue of units does not have. */
function otherQuantity(method: string, id: string, options: AnalysisOptions | null) {
  if (isConstantRate(method)) return { ...foundQuantity(method, id, options ?? {}), unit: '' }
  const kind = kindOfMethod(method)
  const found = isOwnKind(kind) ? methodsOf(kind)[method]?.unknowns.find((unknown) => unknown.id === id) : undefined
  const known = dimensions.find((dimension) => dimension === found?.dimension)
  const bare = found && !known && found.dimension !== 'dimensionless' ? ` ${found.dimension}` : ''
  return { name: found?.label ?? id, dimension: known ?? ('storage' as const), unit: bare }
}

/** Each condition with what was found against it. */
function validityTable(rules: readonly ValidityRule[], findings: readonly Finding[], units: UnitSystem): ReportBlock {
  const rows = rules.map(({ code, statement, source }) => {
    const against = findings.find((finding) => finding.code === code)
    const verdict = against
      ? `${severityWords[against.severity]}: ${findingText(against, units)}`
      : 'Nothing against it'
    return [statement, source, verdict]
  })
  return { kind: 'table', caption: 'Conditions of the method', head: ['Condition', 'Source', 'Found'], rows }
}

function marks({ result, adoption }: Analysis, units: UnitSystem): ReportBlock[] {
  const found = [...result.findings]
    .sort((a, b) => order[a.severity] - order[b.severity])
    .map((finding): ReportMark => ({
      severity: finding.severity,
      word: severityWords[finding.severity],
      text: findingText(finding, units),
    }))
  const reasons = (adoption?.reasons ?? []).map(({ code }): ReportMark => ({
    severity: 'note',
    word: 'Evidence',
    text: evidenceText(code),
  }))
  const items = [...found, ...reasons]
  return items.length > 0 ? [{ kind: 'marked', items }] : []
}

function reviewsTable({ reviews }: Analysis): ReportBlock[] {
  if (reviews.length === 0) return []
  const rows = reviews.map(({ decision, reviewer, createdAt, comment }) => [
    reviewer || '–',
    decision === 'accepted' ? 'Accepted' : 'Returned',
    reportDate(createdAt),
    comment ?? '–',
  ])
  return [{ kind: 'table', caption: 'Reviews', head: ['Reviewer', 'Decision', 'Date', 'Comment'], rows }]
}
