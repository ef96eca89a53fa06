import type { AppliedCorrection } from '#shared/hydraulics/corrections/correction.ts'
import { correctionKinds, type CorrectionKind } from '#shared/hydraulics/corrections/kinds.ts'
import { tidalSpeeds } from '#shared/hydraulics/corrections/tides.ts'
import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatNumber, formatQuantity } from '#shared/quantities/format.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'

/** "air pressure", as it stands within a sentence. */
export function correctionName(kind: string): string {
  const label = Object.hasOwn(correctionKinds, kind) ? correctionKinds[kind as CorrectionKind].label : kind
  return label.charAt(0).toLowerCase() + label.slice(1)
}

const DAY_S = 86_400
const short = { figures: 3, trim: true }
const pair = (value: string, sd: string | null) => (sd === null ? value : `${value} ± ${sd}`)

function efficiencyText({ efficiency, efficiencySd, lag_s = 0 }: Record<string, number>): string[] {
  if (efficiency === undefined) return []
  const sd = efficiencySd === undefined ? null : formatNumber(efficiencySd, { figures: 2 })
  return [
    `efficiency ${pair(formatNumber(efficiency, short), sd)}`,
    lag_s > 0 ? `lag ${formatElapsed(lag_s)}` : 'no lag',
  ]
}

function slopeText({ slope_m_s, slopeSd_m_s }: Record<string, number>, units: UnitSystem): string[] {
  if (slope_m_s === undefined) return []
  const perDay = (value: number) => formatQuantity(value * DAY_S, units.length, { figures: 2, trim: true })
  const sd = slopeSd_m_s === undefined ? null : perDay(slopeSd_m_s)
  return [`drawdown changes by ${pair(perDay(slope_m_s), sd)} in a day`]
}

function tidesText(record: Record<string, number>, units: UnitSystem): string[] {
  return Object.keys(tidalSpeeds).flatMap((id) => {
    const [amplitude, sd] = [record[`${id}_amplitude_m`], record[`${id}_amplitudeSd_m`]]
    if (amplitude === undefined || sd === undefined) return []
    const [value, error] = [amplitude, sd].map((metres) => formatQuantity(metres, units.length, { figures: 2 }))
    return [`${id} ${value} ± ${error}`]
  })
}

/** The figures of a correction: "efficiency 0.45 ± 0.012, lag 2 h, explains 96 % of what moved before pumping". */
export function correctionFigures({ record, given }: Pick<AppliedCorrection, 'record' | 'given'>, units: UnitSystem) {
  const share = record.explained === undefined ? NaN : record.explained
  return [
    ...slopeText(record, units),
    ...efficiencyText(record),
    ...tidesText(record, units),
    ...(given ? ['as given'] : []),
    ...(Number.isFinite(share)
      ? [`explains ${formatNumber(100 * share, { figures: 2, trim: true })} % of what moved before pumping`]
      : []),
  ].join(', ')
}

/** What the figures were learned from: "5 d before pumping, 480 readings"; empty where they were given. */
export function correctionSpan({ record, given }: Pick<AppliedCorrection, 'record' | 'given'>): string {
  const { antecedent_s, readings } = record
  if (given || antecedent_s === undefined || readings === undefined) return ''
  return `${formatElapsed(antecedent_s)} before pumping, ${formatNumber(readings, { figures: 6, trim: true })} readings`
}
