import type { RouteRecordRaw } from 'vue-router'

export const regionalTableRoutes: RouteRecordRaw[] = [
  {
    path: '/regional-table',
    name: 'regional-table',
    // The table scrolls in its own part of the window, so that the sheet of a value stands beside it.
    meta: { title: 'Regional table', action: 'adopted-values/read', full: true },
    component: () => import('../../views/RegionalTableView.vue'),
    children: [
      {
        path: ':id(\\d+)',
        name: 'adopted-value',
        meta: { title: 'Adopted value', action: 'adopted-values/read' },
        component: () => import('../../views/AdoptedValueView.vue'),
      },
    ],
  },
  {
    path: '/regional-table/aquifer-units/:id(\\d+)',
    name: 'unit-statistics',
    meta: { title: 'Statistics of an aquifer unit', action: 'estimates/read' },
    component: () => import('../../views/UnitStatisticsView.vue'),
  },
]
