import type { RouteRecordRaw } from 'vue-router'

export const pumpingTestRoutes: RouteRecordRaw[] = [
  {
    path: '/pumping-tests',
    name: 'pumping-tests',
    meta: { title: 'Tests', action: 'pumping-tests/read' },
    component: () => import('../../views/PumpingTestsView.vue'),
  },
  {
    path: '/pumping-tests/new',
    name: 'new-pumping-test',
    meta: { title: 'New test', action: 'pumping-tests/create' },
    component: () => import('../../views/NewPumpingTestView.vue'),
  },
  {
    path: '/pumping-tests/:id(\\d+)',
    name: 'pumping-test',
    meta: { title: 'Test', action: 'pumping-tests/read' },
    component: () => import('../../views/PumpingTestView.vue'),
  },
  {
    path: '/pumping-tests/:id(\\d+)/edit',
    name: 'edit-pumping-test',
    meta: { title: 'Edit test', action: 'pumping-tests/edit' },
    component: () => import('../../views/EditPumpingTestView.vue'),
  },
  {
    path: '/pumping-tests/:id(\\d+)/report',
    name: 'pumping-test-report',
    meta: { title: 'Analysis report', action: 'analyses/read' },
    component: () => import('../../views/PumpingTestReportView.vue'),
  },
  {
    path: '/pumping-tests/:id(\\d+)/readings',
    name: 'readings',
    meta: { title: 'Readings', action: 'pumping-tests/read' },
    component: () => import('../../views/ReadingsView.vue'),
  },
]
