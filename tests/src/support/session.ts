import { defaultPreferences } from '#shared/contracts/account.ts'
import type { Session } from '#shared/contracts/session.ts'

export const makeRegion = (overrides: Partial<Session['region']> = {}): Session['region'] => ({
  name: 'Isle of Veldray',
  epsg: 32727,
  extent: [-21.5, -38.6, -20.9, -38.2],
  unitSystem: 'metric',
  zone: 'Atlantic/South_Georgia',
  openToVisitors: false,
  rowVersion: 1,
  ...overrides,
})

/** Somebody who is signed in, as an analyst unless told otherwise. */
export const makeSession = (viewer: Partial<Session['viewer']> = {}, rest: Partial<Session> = {}): Session => ({
  viewer: { id: 7, name: 'Ada Field', email: 'ada@veldray.example', role: 'analyst', mayReview: false, ...viewer },
  csrfToken: 'token-1',
  region: makeRegion(),
  preferences: defaultPreferences,
  basemaps: [],
  ...rest,
})

export const makeVisitor = (rest: Partial<Session> = {}): Session =>
  makeSession({ id: null, name: 'Visitor', email: null, role: null }, { csrfToken: null, ...rest })
