import type { OtherPlace, OtherWellInput, OtherWellRecord } from '#shared/contracts/other-wells.ts'

/** One change of rate: typed, with its unit. */
export interface RateForm {
  startS: number | null
  value: number | null
  unit: string | null
}

/** Another pumping well as a form: what nobody has said yet is null. */
export interface OtherWellForm {
  label: string
  placeKind: OtherPlace['kind']
  wellId: number | null
  lon: number | null
  lat: number | null
  distanceM: number | null
  bearingDeg: number | null
  rates: RateForm[]
  fitted: boolean
}

export const newOtherWell = (unit: string): OtherWellForm => ({
  label: '',
  placeKind: 'well',
  wellId: null,
  lon: null,
  lat: null,
  distanceM: null,
  bearingDeg: null,
  rates: [{ startS: 0, value: null, unit }],
  fitted: false,
})

export function otherWellForm({ label, place, rateSteps, fitted }: OtherWellRecord): OtherWellForm {
  return {
    ...newOtherWell(''),
    label,
    placeKind: place.kind,
    ...('wellId' in place ? { wellId: place.wellId } : {}),
    ...('lon' in place ? { lon: place.lon, lat: place.lat } : {}),
    ...('distanceM' in place ? { distanceM: place.distanceM, bearingDeg: place.bearingDeg } : {}),
    rates: rateSteps.map(({ startS, rate }) => ({ startS, value: rate.value, unit: rate.unit })),
    fitted,
  }
}

function placeOf(form: OtherWellForm): OtherPlace | null {
  const { placeKind, wellId, lon, lat, distanceM, bearingDeg } = form
  if (placeKind === 'well') return wellId === null ? null : { kind: placeKind, wellId }
  if (placeKind === 'position') return lon === null || lat === null ? null : { kind: placeKind, lon, lat }
  return distanceM === null || bearingDeg === null ? null : { kind: placeKind, distanceM, bearingDeg }
}

const isWhole = (rate: RateForm): rate is { startS: number; value: number; unit: string } =>
  rate.startS !== null && rate.value !== null && rate.unit !== null

/** What is sent; null while something is missing. */
export function otherWellInputOf(form: OtherWellForm, active = true): OtherWellInput | null {
  const place = placeOf(form)
  const { rates, fitted } = form
  if (!place || !rates.every(isWhole)) return null
  return {
    label: form.label.trim() || null,
    place,
    rateSteps: rates.filter(isWhole).map(({ startS, value, unit }) => ({ startS, rate: { value, unit } })),
    fitted,
    active,
  }
}
