import type { Well, WellInput } from '#shared/contracts/wells.ts'

type Missing = 'x' | 'y' | 'positionAccuracyM'
type FormScreen = { [Key in keyof WellInput['screens'][number]]: WellInput['screens'][number][Key] | null }
type FormPick = { [Key in keyof WellInput['picks'][number]]: WellInput['picks'][number][Key] | null }

/** A well while it is typed: numbers may still be missing. The server says which ones it cannot do without. */
export type WellForm = Omit<WellInput, Missing | 'screens' | 'picks'> & {
  [Key in Missing]: number | null
} & { screens: FormScreen[]; picks: FormPick[] }

export const emptyScreen = (): FormScreen => ({ topM: null, bottomM: null, validFrom: null, validTo: null })
export const emptyPick = (): FormPick => ({ unitId: null, topM: null, bottomM: null, source: '' })

export const emptyWell = (epsg: number): WellForm => ({
  code: '',
  name: null,
  kind: 'well',
  x: null,
  y: null,
  epsg,
  positionAccuracyM: 10,
  groundElevationM: null,
  measuringPointM: null,
  verticalDatum: null,
  depthM: null,
  wellRadiusM: null,
  casingRadiusM: null,
  staticDepthM: null,
  drilledYear: null,
  ownerLabel: null,
  notes: null,
  visibility: 'internal',
  screens: [],
  picks: [],
  confirmOutside: false,
})

/** A saved well as the form edits it: its coordinates as they were given. */
export const formOf = (well: Well): WellForm & { rowVersion: number } => ({
  code: well.code,
  name: well.name,
  kind: well.kind,
  x: well.originalX,
  y: well.originalY,
  epsg: well.originalEpsg,
  positionAccuracyM: well.positionAccuracyM,
  groundElevationM: well.groundElevationM,
  measuringPointM: well.measuringPointM,
  verticalDatum: well.verticalDatum,
  depthM: well.depthM,
  wellRadiusM: well.wellRadiusM,
  casingRadiusM: well.casingRadiusM,
  staticDepthM: well.staticDepthM,
  drilledYear: well.drilledYear,
  ownerLabel: well.ownerLabel,
  notes: well.notes,
  visibility: well.visibility,
  screens: well.screens.map((screen) => ({ ...screen })),
  picks: well.picks.map(({ unitId, topM, bottomM, source }) => ({ unitId, topM, bottomM, source })),
  confirmOutside: false,
  rowVersion: well.rowVersion,
})

/** Empty texts are unknown. What is missing is left for the server to name. */
export const inputOf = (form: WellForm): WellInput => {
  const known = (text: string | null) => (text?.trim() ? text : null)
  return {
    ...form,
    name: known(form.name),
    verticalDatum: known(form.verticalDatum),
    ownerLabel: known(form.ownerLabel),
    notes: known(form.notes),
  } as WellInput
}

/** A date field holds a day; the server keeps the instant at which it begins. */
export const dayOf = (instant: string | null): string => instant?.slice(0, 10) ?? ''
export const instantOf = (day: string | null): string | null => (day ? `${day}T00:00:00Z` : null)
