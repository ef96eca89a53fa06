import type { Page } from '@playwright/test'
import { demoAccount, fillSignInForm, signIn } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

test('A visitor who opens an inner page signs in and arrives there', async ({ page }) => {
  await page.goto('/account')
  await expect(page).toHaveURL(/\/sign-in\?then=/)
  await fillSignInForm(page, demoAccount('reader'))
  await expect(page).toHaveURL(/\/account$/)
  await expect(page.getByRole('heading', { level: 1, name: demoAccount('reader').name })).toBeVisible()
})

test('A wrong password is refused with a sentence and the address stays', async ({ page, watch }) => {
  watch.expect(/401/)
  await page.goto('/sign-in')
  await fillSignInForm(page, { ...demoAccount('reader'), password: 'not the right one' })
  await expect(page.getByRole('alert')).toContainText('The e-mail address or the password is not right.')
  await expect(page.getByLabel('E-mail address')).toHaveValue(demoAccount('reader').email)
})

test('Signing out ends the session', async ({ page }) => {
  await signIn(page, 'reader')
  await page.getByRole('button', { name: /: your menu$/ }).click()
  await page.getByRole('button', { name: 'Sign out' }).click()
  await expect(page).toHaveURL(/\/sign-in/)
  await page.goto('/account')
  await expect(page).toHaveURL(/\/sign-in\?then=/)
})

test('A page that the role may not open says so and shows nothing of it', async ({ page }) => {
  await signIn(page, 'reader')
  await page.goto('/settings/people')
  await expect(page.getByRole('heading', { name: 'Not open to your role' })).toBeVisible()
  await expect(page.getByRole('table')).toHaveCount(0)
})

test('An address that leads nowhere says so', async ({ page }) => {
  await signIn(page, 'reader')
  await page.goto('/no-such-page')
  await expect(page.getByRole('heading', { name: 'Nothing here' })).toBeVisible()
})

/** A person of the test's own, so that the demo accounts stay as they are for other tests. */
async function invite(page: Page, name: string): Promise<string> {
  const email = `${name.toLowerCase().replaceAll(' ', '-')}-${Date.now()}@veldray.example`
  await page.goto('/settings/people')
  await page.getByRole('button', { name: 'Invite a person' }).click()
  await page.getByRole('dialog').getByLabel('Name').fill(name)
  await page.getByRole('dialog').getByLabel('E-mail address').fill(email)
  await page.getByRole('button', { name: 'Send the invitation' }).click()
  await expect(page.getByText(`${name} is invited`)).toBeVisible()
  return email
}

test('An edit survives an expired session: the same person signs in over the page and it is saved', async ({
  page,
  watch,
}) => {
  watch.expect(/401/)
  await signIn(page, 'administrator')
  const email = await invite(page, 'Surveyor')
  await page.getByLabel('Name or address').fill(email)
  await page.getByRole('row', { name: email }).click()
  await page.getByLabel('Name', { exact: true }).fill('Land surveyor')
  await page.context().clearCookies()
  await page.getByRole('button', { name: 'Save' }).click()
  const dialog = page.getByRole('dialog', { name: 'Sign in again to go on' })
  await dialog.getByLabel('Password').fill(demoAccount('administrator').password)
  await dialog.getByRole('button', { name: 'Sign in' }).click()
  await expect(page.getByRole('row', { name: email })).toContainText('Land surveyor')
})

test('An invited person sets a password by the mailed link, signs in, and keeps a choice of units', async ({
  page,
  browser,
}) => {
  await signIn(page, 'administrator')
  const email = await invite(page, 'Newcomer')
  await page.goto('/settings/outbox')
  await page.getByRole('row', { name: email }).click()
  const text = await page.getByLabel('Text of the mail').textContent()
  const token = /set-password#(\S+)/.exec(text ?? '')?.[1]
  expect(token).toBeTruthy()

  const other = await browser.newContext({ baseURL: process.env.BASE_URL! })
  const theirs = await other.newPage()
  await theirs.goto(`/set-password#${token}`)
  await theirs.getByLabel('New password').fill('gravel under the old mill')
  await theirs.getByRole('button', { name: 'Set the password' }).click()
  await expect(theirs.getByLabel('E-mail address')).toHaveValue(email)
  await fillSignInForm(theirs, { email, password: 'gravel under the old mill' })
  await expect(theirs.getByRole('button', { name: 'Newcomer: your menu' })).toBeVisible()

  await theirs.getByRole('button', { name: /^Units:/ }).click()
  await theirs.getByRole('option', { name: 'm²/s · m³/s · m' }).click()
  const chosen = theirs.getByRole('button', { name: 'Units: m²/s · m³/s · m. Change' })
  await expect(chosen).toBeVisible()
  await theirs.evaluate(() => localStorage.clear())
  await theirs.reload()
  await expect(chosen).toBeVisible()
  await other.close()
})

test('A database that goes away is told, and the page comes back by itself when it answers again', async ({
  page,
  watch,
}) => {
  watch.expect(/503/)
  await signIn(page, 'administrator')
  const problem = { type: 'about:blank', title: '', status: 503, code: 'server/unavailable', params: {}, fields: [] }
  const body = JSON.stringify({ ...problem, detail: 'The database does not answer.', requestId: 'r-1' })
  const answer = { status: 503, contentType: 'application/problem+json', body }
  await page.route('**/api/people?*', (route) => route.fulfill(answer), { times: 1 })
  await page.goto('/settings/people')
  await expect(page.getByText('The server does not answer at the moment')).toBeVisible()
  await expect(page.getByRole('row', { name: demoAccount('reader').email })).toBeVisible({ timeout: 20_000 })
  await expect(page.getByText('The server does not answer at the moment')).toBeHidden()
})

test('The list of keys opens with "?" and Esc gives the focus back to the page', async ({ page }) => {
  await signIn(page, 'administrator')
  await page.goto('/settings/people')
  await expect(page.getByRole('heading', { name: 'People' })).toBeVisible()
  await page.keyboard.press('?')
  await expect(page.getByRole('heading', { name: 'Keys' })).toBeVisible()
  // It takes keys from when it has the focus, a frame after it is seen.
  await expect(page.locator('.v-overlay--active :focus, .v-overlay--active:focus')).toHaveCount(1)
  await page.keyboard.press('Escape')
  await expect(page.getByRole('heading', { name: 'Keys' })).toBeHidden()
  await page.getByLabel('Name or address').fill('what?')
  await expect(page.getByRole('heading', { name: 'Keys' })).toBeHidden()
})

test('A dialog opened by a button gives the focus back to it', async ({ page }) => {
  await signIn(page, 'administrator')
  await page.goto('/settings/people')
  const invite = page.getByRole('button', { name: 'Invite a person' })
  await invite.focus()
  await page.keyboard.press('Enter')
  await expect(page.getByRole('dialog')).toBeVisible()
  await page.keyboard.press('Escape')
  await expect(invite).toBeFocused()
})
