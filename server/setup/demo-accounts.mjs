import { readFileSync } from 'node:fs'
import { inRoot } from './places.mjs'

/** @typedef {{ email: string, name: string, role: string, mayReview: boolean, password: string }} DemoAccount */

/** @returns {string} the demo accounts as a small table */
export function demoAccounts() {
  /** @type {DemoAccount[]} */
  const accounts = JSON.parse(readFileSync(inRoot('server/db/seed/accounts.json'), 'utf8'))
  const width = Math.max(...accounts.map(({ email }) => email.length))
  const lines = accounts.map(
    ({ email, password, role, mayReview }) =>
      `  ${email.padEnd(width)}  ${password}  ${role}${mayReview ? ', may review' : ''}`,
  )
  return ['Demo accounts (e-mail, password, role):', ...lines].join('\n')
}
