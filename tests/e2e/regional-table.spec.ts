import { readFile } from 'node:fs/promises'
import { choose, chooseUnits } from './support/choose.ts'
import { signIn, visitAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'
import { expectAccessible } from './support/accessible.ts'
import { expectFitInEachView } from './support/views.ts'

test('A reader filters and sorts the regional table, and Back undoes it', async ({ page }) => {
  await signIn(page, 'reader')
  await page.getByRole('link', { name: 'Regional table' }).click()
  const rows = page.getByRole('region', { name: 'Regional table' }).getByRole('row')
  await expect(rows.nth(1)).toBeVisible()

  await choose(page, page, 'Aquifer unit', 'Brannet Sandstone')
  await expect(page).toHaveURL(/unit=\d+/)
  await expect(rows.filter({ hasText: 'Tarrow Gravels' })).toHaveCount(0)
  await expect(rows.filter({ hasText: 'Brannet Sandstone' }).first()).toBeVisible()

  await choose(page, page, 'Quantity', 'Transmissivity')
  await page.getByRole('columnheader', { name: 'Year' }).click()
  await expect(page).toHaveURL(/sort=year/)
  const years = () => rows.locator('td:nth-child(10)').allInnerTexts()
  await expect.poll(async () => (await years()).join()).toBe((await years()).toSorted().join())

  await page.getByRole('columnheader', { name: 'Year' }).click()
  await expect(page).toHaveURL(/sort=-year/)
  await page.goBack()
  await expect(page).toHaveURL(/sort=year/)
  await page.goBack()
  await page.goBack()
  await expect(page).not.toHaveURL(/quantity=/)
  await expect(page).toHaveURL(/unit=\d+/)
})

test('A row leads back to its analysis, its test, its readings and its history, by keyboard alone', async ({
  page,
}) => {
  await visitAs(page, 'reader')
  await page.goto('/regional-table?method=theis&quantity=T')
  const table = page.getByRole('region', { name: 'Regional table' })
  const first = table.getByRole('row').nth(1)
  await first.focus()
  await page.keyboard.press('ArrowDown')
  await expect(table.getByRole('row').nth(2)).toBeFocused()
  await page.keyboard.press('Enter')
  await expect(page).toHaveURL(/\/regional-table\/\d+\?.*method=theis/)

  const sheet = page.getByRole('complementary', { name: 'Adopted value' })
  await expect(sheet.getByRole('heading', { level: 2, name: 'Where it comes from' })).toBeVisible()
  await expect(sheet.getByRole('link', { name: /^Analysis \d+$/ })).toBeVisible()
  await expect(sheet.getByRole('link', { name: /^Test of / })).toBeVisible()
  await expect(sheet.getByText(/\d+ of \d+ rows taken/).first()).toBeVisible()
  await expect(sheet.getByRole('heading', { name: 'Other values of this test' })).toBeVisible()
  await expect(sheet.getByRole('button', { name: 'Withdraw this value' })).toHaveCount(0)
  await expectAccessible(page)

  await page.keyboard.press('Escape')
  await expect(page).toHaveURL(/\/regional-table\?.*method=theis/)
})

test('The export holds what the filters leave, in the reader’s units', async ({ page }) => {
  await visitAs(page, 'reader')
  await page.goto('/regional-table?quantity=K')
  await expect(page.getByRole('region', { name: 'Regional table' })).toBeVisible()
  const downloading = page.waitForEvent('download')
  await page.getByRole('link', { name: 'Export CSV' }).click()
  const text = await readFile(await (await downloading).path(), 'utf8')
  const [head = '', ...lines] = text.trim().split('\r\n')
  expect(head).toContain('conductivity_m/d')
  expect(lines.length).toBeGreaterThan(10)
  for (const line of lines) expect(line).toContain(',K,')
})

test('A switch of units changes every number at once', async ({ page }) => {
  await visitAs(page, 'reader')
  await page.goto('/regional-table?quantity=T')
  const cell = page.getByRole('region', { name: 'Regional table' }).getByRole('row').nth(1)
  await expect(cell).toContainText('m²/d')
  await chooseUnits(page, /^ft²\/d/)
  await expect(cell).toContainText('ft²/d')
})

test('A steward withdraws a value with a reason, and it leaves the table', async ({ page }) => {
  await visitAs(page, 'steward')
  await page.goto('/regional-table?quantity=T&evidence=slight&sort=-well')
  const table = page.getByRole('region', { name: 'Regional table' })
  const row = table.getByRole('row').nth(1)
  const code = await row.getByRole('rowheader').innerText()
  await row.click()
  await page.getByRole('button', { name: 'Withdraw this value' }).click()
  const dialog = page.getByRole('dialog', { name: 'Withdraw this value' })
  await expect(dialog).toContainText(code)
  await expectAccessible(page)
  await dialog.getByLabel('Why').fill('Read from the wrong page of the report.')
  await dialog.getByRole('button', { name: 'Withdraw the value' }).click()
  await expect(page.getByText('The value is withdrawn.')).toBeVisible()
  const sheet = page.getByRole('complementary', { name: 'Adopted value' })
  await expect(sheet.getByText('Not current')).toBeVisible()
  await expect(sheet.getByRole('button', { name: 'Withdraw this value' })).toHaveCount(0)
})

test('An empty answer says so and clears its filters', async ({ page }) => {
  await visitAs(page, 'reader')
  await page.goto('/regional-table?text=no-such-well')
  await expect(page.getByText('No value fits')).toBeVisible()
  await page.getByRole('button', { name: 'Clear the filters' }).last().click()
  await expect(page.getByRole('region', { name: 'Regional table' })).toBeVisible()
})

test('A reviewer finds what waits and what was decided', async ({ page }) => {
  await signIn(page, 'reviewer')
  await page.getByRole('link', { name: 'Reviews' }).click()
  await expect(page.getByRole('heading', { level: 2, name: 'Waiting for review' })).toBeVisible()
  await expect(page.getByRole('link', { name: /^Well V-\d+, test of / }).first()).toBeVisible()
  await expect(page.getByRole('region', { name: 'Latest decisions' })).toContainText('Returned')
})

test('A reader has no entry for reviews', async ({ page }) => {
  await signIn(page, 'reader')
  await expect(page.getByRole('link', { name: 'Regional table' })).toBeVisible()
  await expect(page.getByRole('link', { name: 'Reviews' })).toHaveCount(0)
  await page.goto('/reviews')
  await expect(page.getByRole('region', { name: 'Latest decisions' })).toHaveCount(0)
})

// Few rows: axe looks at every cell, and all rows are alike.
for (const path of ['/regional-table?quantity=T&evidence=firm&from=2012', '/reviews'])
  test(`${path} is accessible and fits, light and dark, wide and narrow`, async ({ page }) => {
    await visitAs(page, 'reviewer')
    await page.goto(path)
    await expectFitInEachView(page, () => expect(page.getByText(/^Fetching /)).toHaveCount(0))
  })
