import type { OtherWell, Series } from '#shared/hydraulics/analysis.ts'
import { correctionKinds } from '#shared/hydraulics/corrections/kinds.ts'
import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatQuantity } from '#shared/quantities/format.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'
import { correctionFigures, correctionSpan } from '../corrections.ts'
import { directionText } from '../directions.ts'
import { findingText } from '../findings.ts'
import type { ReportBlock, ReportGiven, ReportSection } from './document.ts'

const seriesOf = ({ snapshot: { inputs } }: ReportGiven): readonly Series[] =>
  'series' in inputs ? inputs.series : 'well' in inputs ? [inputs.well] : []
const othersOf = ({ snapshot: { inputs } }: ReportGiven) => ('otherWells' in inputs ? (inputs.otherWells ?? []) : [])

const correctionRows = (series: readonly Series[], units: UnitSystem) =>
  series.flatMap(({ label, corrections = [] }) =>
    corrections.map((correction) => [
      label,
      correctionKinds[correction.kind].label,
      correction.outside ?? '–',
      correctionFigures(correction, units),
      correctionSpan(correction) || 'given',
      correction.findings.map((finding) => findingText(finding, units)).join(' ') || '–',
    ]),
  )

const ratesText = ({ rates }: OtherWell, units: UnitSystem) =>
  rates
    .map(
      ({ start_s, rate_m3_s }) =>
        `${formatQuantity(rate_m3_s, units.discharge, { trim: true })} from ${formatElapsed(start_s)}`,
    )
    .join(', ')

const otherRows = (others: readonly OtherWell[], units: UnitSystem) =>
  others.map((other) => [
    other.label,
    formatQuantity(other.distance_m, units.length),
    directionText(other.bearing_deg),
    ratesText(other, units),
    other.fitted ? 'one factor fitted' : 'as given',
  ])

/** What is taken off the readings now, and the wells that curves superpose; each analysis tells what it was made with. */
export function correctionsSection(given: ReportGiven): ReportSection[] {
  const { units } = given
  const [corrections, others] = [correctionRows(seriesOf(given), units), otherRows(othersOf(given), units)]
  const blocks: ReportBlock[] = [
    ...(corrections.length > 0
      ? [
          {
            kind: 'table' as const,
            caption: 'Corrections of the readings',
            head: ['Well', 'For', 'By the series', 'Figures', 'Learned from', 'To bear in mind'],
            rows: corrections,
          },
        ]
      : []),
    ...(others.length > 0
      ? [
          {
            kind: 'table' as const,
            caption: 'Other wells that pumped',
            head: ['Well', 'Distance', 'Direction', 'Rates', 'Rates are'],
            rows: others,
          },
        ]
      : []),
  ]
  return blocks.length > 0 ? [{ id: 'corrections', title: 'Corrections', blocks }] : []
}
