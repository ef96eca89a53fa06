import type { RouteRecordRaw } from 'vue-router'
import { accountRoutes } from './routes/account.ts'
import { settingsRoutes } from './routes/settings.ts'

/** Every page. To add a subject: a file in routes/, and a line here. Views are loaded when they are opened. */
export const routes: RouteRecordRaw[] = [
  { path: '/', name: 'home', meta: { title: 'Home' }, component: () => import('../views/HomeView.vue') },
  ...accountRoutes,
  ...settingsRoutes,
  {
    path: '/:address(.*)*',
    name: 'not-found',
    meta: { title: 'Nothing here' },
    component: () => import('../views/NotFoundView.vue'),
  },
]
