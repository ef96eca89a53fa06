import { createRouter, createWebHistory } from 'vue-router'
import { guard } from './guards.ts'
import './meta.ts'
import { routes } from './routes.ts'

export const router = createRouter({
  history: createWebHistory(),
  routes,
  scrollBehavior: (to, from, saved) => saved ?? (to.path === from.path ? false : { top: 0 }),
})

router.beforeEach(guard)
