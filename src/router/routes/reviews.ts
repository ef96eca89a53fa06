import type { RouteRecordRaw } from 'vue-router'

export const reviewRoutes: RouteRecordRaw[] = [
  {
    path: '/reviews',
    name: 'reviews',
    meta: { title: 'Reviews', action: 'reviews/read' },
    component: () => import('../../views/ReviewsView.vue'),
  },
]
