import type { RouteLocationRaw } from 'vue-router'

/**
 * Every link of the application is built here, so that a renamed route or a forgotten parameter is a type error
 * and not a dead link. One function per route that something links to.
 */
export type Link = RouteLocationRaw

const named = (name: string, params: Record<string, string | number> = {}): Link => ({ name, params })

export const toHome = (): Link => named('home')
export const toSignIn = (then?: string): Link => ({ name: 'sign-in', query: then && then !== '/' ? { then } : {} })
/** With the address filled in. */
export const toSignInAs = (email: string): Link => ({ name: 'sign-in', query: { email } })
export const toForgottenPassword = (): Link => named('forgotten-password')
export const toAccount = (): Link => named('account')
export const toSettings = (): Link => named('settings')
export const toPeople = (): Link => named('people')
export const toRegionSettings = (): Link => named('region-settings')
export const toJobs = (): Link => named('jobs')
export const toOutbox = (): Link => named('outbox')
export const toAuditTrail = (): Link => named('audit-trail')
