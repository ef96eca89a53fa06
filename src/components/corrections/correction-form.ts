import type { CorrectionRecord, CorrectionSettings, EfficiencySettings } from '#shared/contracts/corrections.ts'
import type { OutsideSummary } from '#shared/contracts/outside-series.ts'
import { correctionKindIds, correctionKinds, type CorrectionKind } from '#shared/hydraulics/corrections/kinds.ts'

const HOUR_S = 3600

/** A correction as a form: what nobody has said yet is null. */
export interface CorrectionForm {
  kind: CorrectionKind
  seriesId: number | null
  /** Figures are typed; otherwise they are learned from the readings before pumping. */
  given: boolean
  slopeMPerS: number | null
  efficiency: number | null
  lagS: number | null
  longestLagS: number | null
  lagStepS: number | null
  /** Null: all wells. */
  wellIds: number[] | null
}

const empty: CorrectionForm = {
  kind: 'barometric',
  seriesId: null,
  given: false,
  slopeMPerS: null,
  efficiency: null,
  lagS: 0,
  longestLagS: 0,
  lagStepS: HOUR_S,
  wellIds: null,
}

/** Series that may cause a correction of a kind. */
export const causesOf = (kind: CorrectionKind, series: readonly OutsideSummary[]) =>
  series.filter(({ quantity }) => quantity === correctionKinds[kind].outside)

export const followsSeries = (kind: CorrectionKind) => correctionKinds[kind].outside !== null

/** A new one: the first kind that can be made from what there is. */
export function newForm(series: readonly OutsideSummary[]): CorrectionForm {
  const kind = correctionKindIds.find((id) => causesOf(id, series).length > 0) ?? 'trend'
  return { ...empty, kind, seriesId: causesOf(kind, series)[0]?.id ?? null }
}

function efficiencyFields(efficiency: EfficiencySettings): Partial<CorrectionForm> {
  return efficiency.from === 'given'
    ? { given: true, efficiency: efficiency.value, lagS: efficiency.lagS }
    : { given: false, longestLagS: efficiency.longestLagS, lagStepS: efficiency.lagStepS }
}

export function formOf({ settings, wellIds }: CorrectionRecord): CorrectionForm {
  const common = { ...empty, kind: settings.kind, wellIds }
  if ('seriesId' in settings) {
    return { ...common, seriesId: settings.seriesId, ...efficiencyFields(settings.efficiency) }
  }
  if (settings.kind === 'trend') {
    return { ...common, given: settings.slopeMPerS !== null, slopeMPerS: settings.slopeMPerS }
  }
  return common
}

function efficiencyOf(form: CorrectionForm): EfficiencySettings | null {
  const { given, efficiency, lagS, longestLagS, lagStepS } = form
  if (given) return efficiency === null || lagS === null ? null : { from: 'given', value: efficiency, lagS }
  return longestLagS === null || lagStepS === null ? null : { from: 'readings', longestLagS, lagStepS }
}

/** What is sent; null while something is missing. */
export function settingsOf(form: CorrectionForm): CorrectionSettings | null {
  const { kind, given, slopeMPerS, seriesId } = form
  if (kind === 'tides') return { version: 1, kind }
  if (kind === 'trend') {
    if (given && slopeMPerS === null) return null
    return { version: 1, kind, slopeMPerS: given ? slopeMPerS : null }
  }
  const efficiency = efficiencyOf(form)
  return seriesId === null || efficiency === null ? null : { version: 1, kind, seriesId, efficiency }
}
