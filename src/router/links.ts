import type { RouteLocationRaw } from 'vue-router'

/**
 * Every link of the application is built here, so that a renamed route or a forgotten parameter is a type error
 * and not a dead link. One function per route that something links to.
 */
export type Link = RouteLocationRaw

const named = (name: string, params: Record<string, string | number> = {}): Link => ({ name, params })

export const toHome = (): Link => named('home')
export const toSignIn = (then?: string): Link => ({ name: 'sign-in', query: then && then !== '/' ? { then } : {} })
/** With the address filled in. */
export const toSignInAs = (email: string): Link => ({ name: 'sign-in', query: { email } })
export const toForgottenPassword = (): Link => named('forgotten-password')
export const toAccount = (): Link => named('account')
export const toSettings = (): Link => named('settings')
export const toPeople = (): Link => named('people')
export const toRegionSettings = (): Link => named('region-settings')
export const toJobs = (): Link => named('jobs')
export const toOutbox = (): Link => named('outbox')
export const toAuditTrail = (): Link => named('audit-trail')

export const toMap = (): Link => named('map')
export const toWell = (id: number): Link => named('well', { id })
export const toEditWell = (id: number): Link => named('edit-well', { id })
/** A well entered at a place of the map, or with coordinates still to be given. */
export const toNewWell = (at?: { lon: number; lat: number }): Link => ({
  name: 'new-well',
  query: at ? { at: placeText(at) } : {},
})
export const toStream = (id: number): Link => named('stream', { id })
export const toAquiferUnit = (id: number): Link => named('aquifer-unit', { id })

/** Latitude first, as coordinates are typed; six decimals are a tenth of a metre. */
const placeText = ({ lat, lon }: { lat: number; lon: number }) => `${lat.toFixed(6)},${lon.toFixed(6)}`

/** The estimate at a place, for the unit with this id. */
export const toPlace = (place: { lat: number; lon: number }, unitId: number | null = null): Link => ({
  name: 'place',
  params: { place: placeText(place) },
  query: unitId === null ? {} : { unit: String(unitId) },
})

export const toPumpingTests = (): Link => named('pumping-tests')
export const toPumpingTestReport = (id: number): Link => named('pumping-test-report', { id })
/** With the pumped well filled in. */
export const toNewPumpingTest = (wellId: number | null = null): Link => ({
  name: 'new-pumping-test',
  query: wellId === null ? {} : { well: String(wellId) },
})
/** With one of its analyses open. */
export const toPumpingTest = (id: number, analysisId: number | null = null): Link => ({
  name: 'pumping-test',
  params: { id },
  query: analysisId === null ? {} : { analysis: String(analysisId) },
})
export const toCorrections = (id: number): Link => ({
  name: 'pumping-test',
  params: { id },
  query: { part: 'corrections' },
})
export const toEditPumpingTest = (id: number): Link => named('edit-pumping-test', { id })
export const toReadings = (id: number): Link => named('readings', { id })

/** Statistics of an aquifer unit; of transmissivity unless told otherwise. */
export const toUnitStatistics = (id: number, quantity: string | null = null): Link => ({
  name: 'unit-statistics',
  params: { id },
  query: quantity === null ? {} : { quantity },
})

export const toRegionalTable = (): Link => named('regional-table')
/** A value of the regional table, with the way back to its readings. */
export const toAdoptedValue = (id: number): Link => named('adopted-value', { id })
export const toReviews = (): Link => named('reviews')
