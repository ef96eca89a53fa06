import type { RouteRecordRaw } from 'vue-router'

export const accountRoutes: RouteRecordRaw[] = [
  {
    path: '/sign-in',
    name: 'sign-in',
    meta: { title: 'Sign in', frame: 'plain' },
    component: () => import('../../views/SignInView.vue'),
  },
  {
    path: '/forgotten-password',
    name: 'forgotten-password',
    meta: { title: 'Forgotten password', frame: 'plain' },
    component: () => import('../../views/ForgottenPasswordView.vue'),
  },
  {
    path: '/set-password',
    name: 'set-password',
    meta: { title: 'Choose a password', frame: 'plain' },
    component: () => import('../../views/SetPasswordView.vue'),
  },
  {
    path: '/account',
    name: 'account',
    meta: { title: 'Your account', action: 'account/edit' },
    component: () => import('../../views/AccountView.vue'),
  },
]
