import type { Locator, Page } from '@playwright/test'

/** Opens a select by keyboard and takes one of its options. */
export async function choose(page: Page, within: Page | Locator, label: string, option: string | RegExp) {
  await within.getByRole('combobox', { name: label, exact: true }).press('Enter')
  await page.getByRole('listbox').getByRole('option', { name: option }).click()
}

/**
 * Switches the units for this page alone: what a person chose is kept on the account, which tests that run at the same
 * time share.
 */
export async function chooseUnits(page: Page, option: RegExp) {
  await page.route('**/api/account/preferences', (route) =>
    route.fulfill({ contentType: 'application/json', body: route.request().postData() ?? '{}' }),
  )
  await page.getByRole('button', { name: /^Units:/ }).click()
  await page.getByRole('option', { name: option }).click()
}
