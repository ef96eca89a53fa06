import { choose, chooseUnits } from './support/choose.ts'
import { signIn, visitAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'
import { expectFitInEachView } from './support/views.ts'

/** A place in the middle of the Tarrow Gravels. */
const PLACE = '/map/place/-38.417200,-21.184000'
const sheetOf = (page: import('@playwright/test').Page) =>
  page.getByRole('complementary', { name: 'Estimate at a place' })

test('A consultant types coordinates and gets the estimate with its interval, notes, weights and tests nearby', async ({
  page,
}) => {
  await signIn(page, 'reader')
  const search = page.getByRole('combobox', { name: /search/i })
  await search.fill('32727: 483937 5747878')
  await page.getByRole('option', { name: /483.937 E/ }).click()
  await expect(page).toHaveURL(/\/map\/place\/-38\.417/)

  const sheet = sheetOf(page)
  await expect(sheet.getByRole('heading', { level: 1 })).toHaveText(/483\u202f93\d E, 5\u202f747\u202f87\d N/)
  await expect(sheet.getByText('38.4172° S, 21.1840° W')).toBeVisible()
  const figure = sheet.getByRole('region', { name: 'Estimate' })
  await expect(figure).toContainText(/\d\s*m²\/d transmissivity, median/)
  await expect(figure).toContainText(/(Well|Partly|Weakly) supported/)
  await expect(figure.getByRole('img')).toHaveAccessibleName(/^Median .* 95 % interval .* values carried it\.$/)
  await expect(figure).toContainText('An estimate is for planning.')
  await expect(sheet.getByRole('region', { name: 'Confidence notes' }).getByRole('listitem').first()).toBeVisible()
  await expect(sheet.getByRole('region', { name: 'Carried by' })).toContainText(/V-\d{4}/)
  await expect(sheet.getByText(/left-out tests; its mean width is a factor of/)).toBeVisible()
  await expect(sheet.getByText(/practical range/)).toBeVisible()
  await expect(sheet.getByRole('region', { name: 'Tests nearby' })).toContainText(/\d+ tests?/)
  await expect(sheet.getByRole('region', { name: 'Before fieldwork' })).toContainText('Pumping near a coast')
})

test('Unit, quantity and depth are asked anew, and the address keeps the question', async ({ page }) => {
  await visitAs(page, 'reader')
  await page.goto(PLACE)
  const sheet = sheetOf(page)
  await expect(sheet.getByText(/transmissivity, median/)).toBeVisible()

  await choose(page, sheet, 'Aquifer unit', /Fennick Limestone/)
  await expect(page).toHaveURL(/unit=\d+/)
  await expect(sheet.getByText(/Fennick Limestone · leaky/)).toBeVisible()

  await choose(page, sheet, 'Quantity', 'Storativity')
  await expect(sheet.getByText(/storativity, median/)).toBeVisible()

  await sheet.getByLabel('Depth, if known').fill('3')
  await expect(page).toHaveURL(/depth=3/)
  await expect(sheet.getByText(/lies outside the tested screens/)).toBeVisible()
  await page.reload()
  await expect(sheet.getByText(/storativity, median/)).toBeVisible()
  await expect(sheet.getByText(/lies outside the tested screens/)).toBeVisible()
})

test('The interval can be read for a new test, in other units and in other coordinates', async ({ page }) => {
  await visitAs(page, 'reader')
  await page.goto(PLACE)
  const figure = sheetOf(page).getByRole('region', { name: 'Estimate' })
  const interval = figure.locator('dd').nth(1)
  await expect(interval).toContainText('m²/d')
  const ofTruth = await interval.innerText()
  await figure.getByRole('button', { name: 'What a new test would show' }).click()
  await expect(interval).not.toHaveText(ofTruth)

  await chooseUnits(page, /^ft²\/d/)
  await expect(interval).toContainText('ft²/d')

  await sheetOf(page).getByRole('button', { name: 'Other system' }).click()
  const code = sheetOf(page).getByLabel('EPSG code')
  await code.fill('32728')
  await expect(sheetOf(page).getByText(/UTM zone 28S/)).toBeVisible()
  await code.fill('999999')
  await expect(sheetOf(page).getByText(/EPSG:999999 is not among the offered coordinate systems/)).toBeVisible()
})

test('The radius is typed or slid, and narrows the tests', async ({ page }) => {
  await visitAs(page, 'reader')
  await page.goto(`${PLACE}?radius=8000`)
  const nearby = sheetOf(page).getByRole('region', { name: 'Tests nearby' })
  const count = nearby.getByRole('status')
  await expect(count).toHaveText(/\d+ tests/)
  const wide = await count.innerText()
  await nearby.getByLabel('Radius').first().fill('1500')
  await expect(page).toHaveURL(/radius=1500/)
  await expect(count).not.toHaveText(wide)
  await nearby.getByLabel('Radius').first().fill('1')
  await expect(nearby.getByText(/No test that you may see lies within this radius/)).toBeVisible()
})

test('Where nothing can be estimated the sheet says why and what is near', async ({ page }) => {
  await visitAs(page, 'reader')
  await page.goto('/map/place/-38.700000,-21.900000')
  await expect(sheetOf(page).getByText('No aquifer unit is mapped here', { exact: false })).toBeVisible()
  await page.goto('/map/place/-38.417200,-21.184000?quantity=S')
  await expect(sheetOf(page).getByRole('region', { name: 'No estimate' })).toBeVisible()
  await expect(sheetOf(page).getByText(/four sites are needed/)).toBeVisible()
  await page.goto('/map/place/north,west')
  await expect(page.getByRole('heading', { level: 1, name: 'This is no place' })).toBeVisible()
})

test('The sheet is accessible and fits, light and dark, wide and narrow', async ({ page }) => {
  await visitAs(page, 'reader')
  await expectFitInEachView(page, async () => {
    await page.goto(PLACE)
    await expect(sheetOf(page).getByText(/transmissivity, median/)).toBeVisible()
    await expect(sheetOf(page).getByText(/^Fetching /)).toHaveCount(0)
  })
})
