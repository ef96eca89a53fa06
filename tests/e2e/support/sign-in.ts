import { readFileSync } from 'node:fs'
import { expect, type BrowserContext, type Page } from '@playwright/test'

interface Account {
  email: string
  name: string
  role: string
  mayReview: boolean
  password: string
}

const accounts = JSON.parse(
  readFileSync(new URL('../../../server/db/seed/accounts.json', import.meta.url), 'utf8'),
) as Account[]

/** The demo accounts by the part of their address before the @. */
export type DemoAccount = 'reader' | 'analyst' | 'reviewer' | 'steward' | 'administrator'

export function demoAccount(who: DemoAccount): Account {
  const found = accounts.find(({ email }) => email.startsWith(`${who}@`))
  if (!found) throw new Error(`There is no demo account of the ${who}`)
  return found
}

export async function fillSignInForm(page: Page, { email, password }: { email: string; password: string }) {
  await page.getByLabel('E-mail address').fill(email)
  await page.getByLabel('Password', { exact: true }).fill(password)
  await page.getByRole('button', { name: 'Sign in' }).click()
}

/** Signs a demo account in through the form and waits until the frame stands. */
export async function signIn(page: Page, who: DemoAccount) {
  await page.goto('/sign-in')
  await fillSignInForm(page, demoAccount(who))
  await expect(page.getByRole('button', { name: /: your menu$/ })).toBeVisible()
}

/** Cookies of each account that this worker signed in: the form twice over takes longer than most tests. */
const sessions = new Map<DemoAccount, Awaited<ReturnType<BrowserContext['cookies']>>>()

/** Lets the page's next visit be that of a person who signed in before; the first time in a worker, through the form. */
export async function visitAs(page: Page, who: DemoAccount) {
  const known = sessions.get(who)
  if (known) return page.context().addCookies(known)
  await signIn(page, who)
  sessions.set(who, await page.context().cookies())
}
