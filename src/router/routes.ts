import type { RouteRecordRaw } from 'vue-router'
import { accountRoutes } from './routes/account.ts'
import { mapRoutes } from './routes/map.ts'
import { pumpingTestRoutes } from './routes/pumping-tests.ts'
import { regionalTableRoutes } from './routes/regional-table.ts'
import { reviewRoutes } from './routes/reviews.ts'
import { settingsRoutes } from './routes/settings.ts'

/** Every page. To add a subject: a file in routes/, and a line here. Views are loaded when they are opened. */
export const routes: RouteRecordRaw[] = [
  { path: '/', name: 'home', meta: { title: 'Home' }, component: () => import('../views/HomeView.vue') },
  ...mapRoutes,
  ...pumpingTestRoutes,
  ...regionalTableRoutes,
  ...reviewRoutes,
  ...accountRoutes,
  ...settingsRoutes,
  {
    path: '/:address(.*)*',
    name: 'not-found',
    meta: { title: 'Nothing here' },
    component: () => import('../views/NotFoundView.vue'),
  },
]
