import type { RouteRecordRaw } from 'vue-router'

/** The map, and the sheets that open beside it; each has its own address. */
export const mapRoutes: RouteRecordRaw[] = [
  {
    path: '/map',
    name: 'map',
    meta: { title: 'Map', action: 'map/read', full: true },
    component: () => import('../../views/MapView.vue'),
    children: [
      {
        path: 'place/:place',
        name: 'place',
        meta: { title: 'Place', action: 'estimates/read' },
        component: () => import('../../views/PlaceView.vue'),
      },
      {
        path: 'wells/new',
        name: 'new-well',
        meta: { title: 'New well', action: 'wells/create' },
        component: () => import('../../views/NewWellView.vue'),
      },
      {
        path: 'wells/:id(\\d+)',
        name: 'well',
        meta: { title: 'Well', action: 'wells/read' },
        component: () => import('../../views/WellView.vue'),
      },
      {
        path: 'wells/:id(\\d+)/edit',
        name: 'edit-well',
        meta: { title: 'Edit well', action: 'wells/edit' },
        component: () => import('../../views/EditWellView.vue'),
      },
      {
        path: 'streams/:id(\\d+)',
        name: 'stream',
        meta: { title: 'Stream', action: 'streams/read' },
        component: () => import('../../views/StreamView.vue'),
      },
      {
        path: 'aquifer-units/:id(\\d+)',
        name: 'aquifer-unit',
        meta: { title: 'Aquifer unit', action: 'aquifer-units/read' },
        component: () => import('../../views/AquiferUnitView.vue'),
      },
    ],
  },
]
