import type { SlugDetails } from '#shared/contracts/test-details.ts'
import type { Well } from '#shared/contracts/wells.ts'

/** What is known of one repeat, as it is typed. */
export interface RepeatForm {
  seriesId: number
  label: string
  initialM: number | null
  startS: number | null
}

/** Construction and assumptions of a slug test as they are typed: what is not yet known is null. */
export interface SlugForm {
  casingRadiusM: number | null
  wellRadiusM: number | null
  screenRadiusM: number | null
  screenLengthM: number | null
  screenTopM: number | null
  hasPack: boolean
  packRadiusM: number | null
  packPorosity: number | null
  radiusError: number | null
  anisotropy: number | null
  storage: number | null
  storageLogSd: number | null
  repeats: RepeatForm[]
}

/** Common practice: a casing is known to two per cent, a gravel pack drains a quarter of its volume. */
export const emptySlug = (): SlugForm => ({
  casingRadiusM: null,
  wellRadiusM: null,
  screenRadiusM: null,
  screenLengthM: null,
  screenTopM: null,
  hasPack: false,
  packRadiusM: null,
  packPorosity: 0.25,
  radiusError: 0.02,
  anisotropy: 1,
  storage: 1e-4,
  storageLogSd: 1,
  repeats: [],
})

/** Fields left empty go as null, so that the server names every one of them. */
export function slugDetailsOf(form: SlugForm): SlugDetails {
  const { hasPack, packRadiusM, packPorosity, storage, storageLogSd, repeats, ...rest } = form
  return {
    version: 1,
    kind: 'slug',
    ...rest,
    filterPack: hasPack ? { radiusM: packRadiusM, porosity: packPorosity } : null,
    storage: { value: storage, logSd: storageLogSd },
    repeats: repeats
      .filter(({ label, initialM, startS }) => label.trim() !== '' || initialM !== null || startS !== null)
      .map(({ label, ...repeat }) => ({ ...repeat, label: label.trim() || null })),
  } as SlugDetails
}

/** A saved slug test, to be changed; every log has its line. */
export function slugFormOf(details: SlugDetails, seriesIds: readonly number[]): SlugForm {
  const { version: _v, kind: _k, filterPack, storage, repeats, ...rest } = details
  const fresh = emptySlug()
  return {
    ...rest,
    hasPack: filterPack !== null,
    packRadiusM: filterPack?.radiusM ?? null,
    packPorosity: filterPack?.porosity ?? fresh.packPorosity,
    storage: storage.value,
    storageLogSd: storage.logSd,
    repeats: seriesIds.map((seriesId) => {
      const known = repeats.find((repeat) => repeat.seriesId === seriesId)
      return {
        seriesId,
        label: known?.label ?? '',
        initialM: known?.initialM ?? null,
        startS: known?.startS ?? null,
      }
    }),
  }
}

/** What the well says about its own construction; its screen is counted from the static level. */
export function slugSuggestions(well: Well): SlugForm {
  const { casingRadiusM, wellRadiusM, staticDepthM, measuringPointM, screens } = well
  const top = Math.min(...screens.map(({ topM }) => topM))
  const bottom = Math.max(...screens.map(({ bottomM }) => bottomM))
  const known = screens.length > 0
  const water = staticDepthM === null ? null : staticDepthM - (measuringPointM ?? 0)
  return {
    ...emptySlug(),
    casingRadiusM,
    wellRadiusM,
    screenRadiusM: casingRadiusM,
    screenLengthM: known ? bottom - top : null,
    screenTopM: known && water !== null ? Number((top - water).toFixed(3)) : null,
  }
}
