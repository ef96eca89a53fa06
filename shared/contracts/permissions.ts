import { z } from 'zod'

export const role = z.enum(['reader', 'analyst', 'steward', 'administrator'])
export type Role = z.infer<typeof role>

export interface Viewer {
  /** Null for a visitor who is not signed in. */
  id: number | null
  name: string
  role: Role | null
  mayReview: boolean
}

export const visitor: Viewer = { id: null, name: 'Visitor', role: null, mayReview: false }

/** Who may do what. Roles are cumulative; `visitor` is everybody; `review` is a right of its own. */
export const actions = {
  'session/read': 'visitor',
  'session/sign-in': 'visitor',
  'session/sign-out': 'visitor',
  'password/reset': 'visitor',
  'settings/read': 'visitor',
  'health/read': 'visitor',
  'api-description/read': 'reader',
  'account/edit': 'reader',
  'progress/follow': 'reader',
  'people/manage': 'administrator',
  'outbox/read': 'administrator',
  'audit/read': 'administrator',
  'jobs/read': 'steward',
  'jobs/cancel': 'steward',
  'region/edit': 'administrator',
  'map/read': 'region-reader',
  'wells/read': 'region-reader',
  'wells/create': 'analyst',
  'wells/edit': 'analyst',
  'streams/read': 'region-reader',
  'aquifer-units/read': 'region-reader',
  'boundaries/read': 'region-reader',
  'search/read': 'region-reader',
  'pumping-tests/read': 'region-reader',
  'pumping-tests/create': 'analyst',
  'pumping-tests/edit': 'analyst',
  'analyses/read': 'region-reader',
  'analyses/create': 'analyst',
  'analyses/submit': 'analyst',
  'reviews/read': 'analyst',
  'reviews/decide': 'review',
  'adopted-values/read': 'region-reader',
  'adopted-values/export': 'region-reader',
  'adopted-values/withdraw': 'steward',
  'visibility/edit': 'steward',
  'estimates/read': 'region-reader',
} as const satisfies Record<string, Role | 'visitor' | 'review' | 'region-reader'>

export type Action = keyof typeof actions

const rank: Record<Role, number> = { reader: 1, analyst: 2, steward: 3, administrator: 4 }

export interface RegionAccess {
  /** The administrator may open the published layers to people who are not signed in. */
  openToVisitors: boolean
}

/** Whether the viewer may do the action at all; ownership and visibility of single records are the services' business. */
export function can(viewer: Viewer, action: Action, region: RegionAccess = { openToVisitors: false }): boolean {
  const needed = actions[action]
  if (needed === 'visitor') return true
  if (needed === 'region-reader') return viewer.role !== null || region.openToVisitors
  if (needed === 'review') return viewer.role !== null && rank[viewer.role] >= rank.analyst && viewer.mayReview
  return viewer.role !== null && rank[viewer.role] >= rank[needed]
}

export const atLeast = (viewer: Viewer, needed: Role): boolean =>
  viewer.role !== null && rank[viewer.role] >= rank[needed]
