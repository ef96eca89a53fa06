import type { RouteRecordRaw } from 'vue-router'

export const settingsRoutes: RouteRecordRaw[] = [
  {
    path: '/settings',
    name: 'settings',
    meta: { title: 'Settings' },
    component: () => import('../../views/SettingsView.vue'),
    children: [
      {
        path: 'people',
        name: 'people',
        meta: { title: 'People', action: 'people/manage' },
        component: () => import('../../views/PeopleView.vue'),
      },
      {
        path: 'region',
        name: 'region-settings',
        meta: { title: 'Region', action: 'region/edit' },
        component: () => import('../../views/RegionSettingsView.vue'),
      },
      {
        path: 'jobs',
        name: 'jobs',
        meta: { title: 'Jobs', action: 'jobs/read' },
        component: () => import('../../views/JobsView.vue'),
      },
      {
        path: 'outbox',
        name: 'outbox',
        meta: { title: 'Outbox', action: 'outbox/read' },
        component: () => import('../../views/OutboxView.vue'),
      },
      {
        path: 'audit-trail',
        name: 'audit-trail',
        meta: { title: 'Audit trail', action: 'audit/read' },
        component: () => import('../../views/AuditTrailView.vue'),
      },
    ],
  },
]
