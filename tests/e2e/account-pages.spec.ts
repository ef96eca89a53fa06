import type { Page } from '@playwright/test'
import { expectAccessible } from './support/accessible.ts'
import { visitAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'
import { expectFitInEachView } from './support/views.ts'

const forVisitors = [
  ['/sign-in', 'Sign in'],
  ['/forgotten-password', 'Forgotten password'],
] as const
const forAdministrators = [
  ['/account', 'Administrator'],
  ['/settings/people', 'People'],
  ['/settings/region', 'Region'],
  ['/settings/jobs', 'Jobs'],
  ['/settings/outbox', 'Outbox'],
  ['/settings/audit-trail', 'Audit trail'],
  ['/no-such-page', 'Nothing here'],
] as const

/** The page as it stands in each theme and width. */
async function expectPageToFit(page: Page, path: string, heading: string) {
  await page.goto(path)
  await expect(page.getByRole('heading', { level: 1, name: heading })).toBeVisible()
  await expectFitInEachView(page, () => expect(page.getByText(/^Fetching /)).toHaveCount(0))
}

for (const [path, heading] of forVisitors)
  test(`${path} is accessible and fits, light and dark, wide and narrow`, async ({ page }) => {
    await expectPageToFit(page, path, heading)
  })

for (const [path, heading] of forAdministrators)
  test(`${path} is accessible and fits, light and dark, wide and narrow`, async ({ page }) => {
    await visitAs(page, 'administrator')
    await expectPageToFit(page, path, heading)
  })

test('Menus and dialogs of the frame are accessible', async ({ page }) => {
  await visitAs(page, 'administrator')
  await page.goto('/settings/people')
  await page.getByRole('button', { name: /^Units:/ }).click()
  await expect(page.getByRole('option').first()).toBeVisible()
  await expectAccessible(page)
  await page.keyboard.press('Escape')
  await page.getByRole('button', { name: /: your menu$/ }).click()
  await expect(page.getByRole('dialog', { name: 'Your menu' })).toBeVisible()
  await expectAccessible(page)
  await page.keyboard.press('Escape')
  await page.getByRole('button', { name: 'Invite a person' }).click()
  await expect(page.getByRole('dialog', { name: 'Invite a person' })).toBeVisible()
  await expectAccessible(page)
})
