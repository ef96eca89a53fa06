import { mdiCheckDecagramOutline, mdiCogOutline, mdiMapOutline, mdiTable, mdiChartBellCurveCumulative } from '@mdi/js'
import type { Action } from '#shared/contracts/permissions.ts'
import {
  toAuditTrail,
  toJobs,
  toMap,
  toOutbox,
  toPeople,
  toPumpingTests,
  toRegionalTable,
  toRegionSettings,
  toReviews,
  toSettings,
  type Link,
} from './links.ts'

export interface NavigationEntry {
  title: string
  to: Link
  /** Shown only to those who may do this; several: to those who may do any of them. */
  action: Action | readonly Action[]
}

export interface MainEntry extends NavigationEntry {
  icon: string
  /** First part of the paths that belong to the entry, to mark it as the present one. */
  paths: readonly string[]
  /** Key that opens it. */
  key?: string
}

/** Pages under Settings, in the order of the menu. */
export const settingsPages: readonly NavigationEntry[] = [
  { title: 'People', to: toPeople(), action: 'people/manage' },
  { title: 'Region', to: toRegionSettings(), action: 'region/edit' },
  { title: 'Jobs', to: toJobs(), action: 'jobs/read' },
  { title: 'Outbox', to: toOutbox(), action: 'outbox/read' },
  { title: 'Audit trail', to: toAuditTrail(), action: 'audit/read' },
]

/** The rail. The first entry that a reader may open is their home. One line per subject; Settings stays last. */
export const navigation: readonly MainEntry[] = [
  { title: 'Map', to: toMap(), icon: mdiMapOutline, paths: ['/map'], action: 'map/read', key: 'm' },
  {
    title: 'Regional table',
    to: toRegionalTable(),
    icon: mdiTable,
    paths: ['/regional-table'],
    action: 'adopted-values/read',
  },
  {
    title: 'Tests',
    to: toPumpingTests(),
    icon: mdiChartBellCurveCumulative,
    paths: ['/pumping-tests'],
    action: 'pumping-tests/read',
  },
  { title: 'Reviews', to: toReviews(), icon: mdiCheckDecagramOutline, paths: ['/reviews'], action: 'reviews/read' },
  {
    title: 'Settings',
    to: toSettings(),
    icon: mdiCogOutline,
    paths: ['/settings'],
    action: settingsPages.flatMap(({ action }) => action),
  },
]

type MayDo = (action: Action) => boolean

/** The entries that somebody with these rights sees. */
export const entriesFor = <Entry extends NavigationEntry>(entries: readonly Entry[], can: MayDo): Entry[] =>
  entries.filter(({ action }) => [action].flat().some(can))
