import type { Page } from '@playwright/test'
import { expectAccessible, expectNoSidewaysScroll } from './support/accessible.ts'
import { chooseUnits } from './support/choose.ts'
import { visitAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'
import { views } from './support/views.ts'

const layers = (page: Page) => page.getByRole('region', { name: 'Layers' })
const legend = (page: Page) => page.getByRole('region', { name: 'Legend' })
const sheet = (page: Page, name: string) => page.getByRole('complementary', { name })

/** Until the wells of the first view are drawn. */
async function openMap(page: Page, path = '/map') {
  await page.goto(path)
  await expect(legend(page).getByRole('button', { name: 'firm' })).toBeVisible()
}

async function wellsInView(page: Page): Promise<number> {
  const row = layers(page).getByRole('group', { name: 'On the map' })
  return Number(((await row.innerText()).match(/Wells\s+([\d\u202f]+)/)?.[1] ?? '').replace('\u202f', ''))
}

async function openList(page: Page) {
  await layers(page).getByRole('button', { name: 'In view' }).click()
  return layers(page).getByRole('list', { name: 'Wells' })
}

test('The map opens at the home extent with wells by value, streams, units, the fault and a legend of them', async ({
  page,
}) => {
  await visitAs(page, 'reader')
  await openMap(page)
  await expect(legend(page)).toContainText('Transmissivity, m²/d')
  for (const entry of ['firm', 'fair', 'slight', 'no value yet', 'stream', 'unit outline', 'fault'])
    await expect(legend(page).getByRole('button', { name: entry })).toBeVisible()
  expect(await wellsInView(page)).toBeGreaterThan(200)
  await expect(page.getByText('Land outlines: Natural Earth.')).toBeVisible()
  await expect(page.getByRole('img', { name: /^Scale: this bar is \d+ km$/ })).toBeVisible()
})

test('A legend entry leaves only its wells; the list in view says the same', async ({ page }) => {
  await visitAs(page, 'analyst')
  await openMap(page)
  const all = await wellsInView(page)
  const list = await openList(page)
  await legend(page).getByRole('button', { name: 'firm' }).click()
  await expect(list.getByRole('listitem').first()).toContainText('firm')
  await expect.poll(() => wellsInView(page)).toBeLessThan(all)
  const count = await wellsInView(page)
  await expect(list.getByRole('listitem')).toHaveCount(count)
  await expect(list.getByText(/, (fair|slight)|no value/)).toHaveCount(0)

  await legend(page).getByRole('button', { name: '300 to 1\u202f000' }).click()
  await expect(list.getByRole('listitem').first()).toContainText(/[3-9]\d\d m²\/d/)
  await legend(page).getByRole('button', { name: 'Show all wells' }).click()
  await expect.poll(() => wellsInView(page)).toBe(all)
})

test('Unit and parameter recolour the wells, in the units that the reader chooses', async ({ page }) => {
  await visitAs(page, 'analyst')
  await openMap(page)
  await layers(page).getByLabel('Aquifer unit').selectOption({ label: 'Fennick Limestone' })
  await layers(page).getByLabel('Value of the wells').selectOption({ label: 'Storativity' })
  await expect(legend(page)).toContainText('Storativity')
  await expect(
    legend(page)
      .getByRole('button', { name: '0.0001 to 0.0003' })
      .or(legend(page).getByRole('button', { name: '1×10⁻⁴ to 3×10⁻⁴' })),
  ).toBeVisible()
  await layers(page).getByLabel('Value of the wells').selectOption({ label: 'Transmissivity' })
  await chooseUnits(page, /^ft²\/d/)
  await expect(legend(page)).toContainText('Transmissivity, ft²/d')
  await expect(legend(page).getByRole('button', { name: '100 to 300', exact: true })).toBeVisible()
})

test('A well opens from the list by keyboard, has its own address, and Back and Escape lead out', async ({ page }) => {
  await visitAs(page, 'reader')
  await openMap(page)
  const list = await openList(page)
  const first = list.getByRole('link').first()
  const code = (await first.innerText()).split(/\s/)[0]!
  await first.focus()
  await page.keyboard.press('Enter')
  const well = sheet(page, 'Well')
  await expect(well.getByRole('heading', { level: 1, name: code })).toBeVisible()
  await expect(page).toHaveURL(/\/map\/wells\/\d+$/)
  await expect(page).toHaveTitle(new RegExp(code))
  await expect(well.getByRole('img', { name: new RegExp(`^Section of ${code}`) })).toBeVisible()
  await expect(well.getByText(/\d° S, \d+\.\d+° W/)).toBeVisible()

  await page.reload()
  await expect(well.getByRole('heading', { level: 1, name: code })).toBeVisible()
  await page.keyboard.press('Escape')
  await expect(page).toHaveURL(/\/map$/)
  await page.goBack()
  await expect(well.getByRole('heading', { level: 1, name: code })).toBeVisible()
})

const mercator = (lat: number) => Math.asinh(Math.tan((lat * Math.PI) / 180))

/** The place under the pointer, as the map says it. */
async function placeAt(page: Page, x: number, y: number): Promise<{ lon: number; lat: number }> {
  await page.mouse.move(x, y)
  const text = await page.getByText(/^\d+\.\d{4}° S, \d+\.\d{4}° W$/).innerText()
  const [lat = NaN, lon = NaN] = (text.match(/\d+\.\d{4}/g) ?? []).map(Number)
  return { lon: -lon, lat: -lat }
}

/** Where a place lies on the page, from what the map says of two other points. */
async function pixelOf(page: Page, { lon, lat }: { lon: number; lat: number }): Promise<{ x: number; y: number }> {
  const [a, b] = [
    { x: 500, y: 200 },
    { x: 1100, y: 700 },
  ] as const
  const at = [await placeAt(page, a.x, a.y), await placeAt(page, b.x, b.y)] as const
  const across = (lon - at[0].lon) / (at[1].lon - at[0].lon)
  const down = (mercator(lat) - mercator(at[0].lat)) / (mercator(at[1].lat) - mercator(at[0].lat))
  return { x: a.x + across * (b.x - a.x), y: a.y + down * (b.y - a.y) }
}

test('A disc says what it is under the pointer, and a click opens its well', async ({ page }) => {
  await visitAs(page, 'reader')
  await openMap(page)
  const answer = await page.request.get('/api/map/wells?bbox=-21.5,-38.6,-20.9,-38.2&zoom=11')
  const { wells } = (await answer.json()) as { wells: { code: string; lon: number; lat: number }[] }
  const apart = (a: { lon: number; lat: number }) =>
    Math.min(...wells.filter((b) => b !== a).map((b) => Math.hypot(a.lon - b.lon, a.lat - b.lat)))
  const lonely = wells.reduce((best, well) => (apart(well) > apart(best) ? well : best))
  const { x, y } = await pixelOf(page, lonely)
  await page.mouse.move(x, y)
  await expect(page.getByText(lonely.code, { exact: true })).toBeVisible()
  await page.mouse.click(x, y)
  await expect(sheet(page, 'Well').getByRole('heading', { level: 1, name: lonely.code })).toBeVisible()
})

test('A click on the empty map opens the place, and a switched-off layer takes no clicks', async ({ page }) => {
  await visitAs(page, 'reader')
  await openMap(page)
  for (const name of ['Wells', 'Streams', 'Unit outlines', 'Boundaries'])
    await layers(page).getByRole('checkbox', { name }).uncheck()
  await expect(legend(page)).toContainText('Nothing here.')
  const map = page.getByRole('application', { name: 'Map' })
  const box = (await map.boundingBox())!
  await map.click({ position: { x: box.width / 2, y: box.height / 2 } })
  await expect(page).toHaveURL(/\/map\/place\/-38\.\d+,-21\.\d+\?unit=\d+$/)
})

test('Enter on the map asks for the place in its middle', async ({ page }) => {
  await visitAs(page, 'reader')
  await openMap(page)
  await page.getByRole('application', { name: 'Map' }).focus()
  await page.keyboard.press('Enter')
  await expect(page).toHaveURL(/\/map\/place\/-38\.\d+,-21\.\d+/)
})

test('Coordinates under the pointer stand in degrees and in the region’s system', async ({ page }) => {
  await visitAs(page, 'reader')
  await openMap(page)
  await page.mouse.move(760, 420)
  await expect(page.getByText(/^\d\d\.\d{4}° S, \d\d\.\d{4}° W$/)).toBeVisible()
  await expect(page.getByText(/\d{3}\u202f\d{3} E, 5\u202f\d{3}\u202f\d{3} N/)).toBeVisible()
})

test('The search finds wells, streams, units and places from anywhere', async ({ page }) => {
  await visitAs(page, 'reader')
  await page.goto('/account')
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
  await page.keyboard.press('/')
  const search = page.getByRole('combobox', { name: /^Search/ })
  await expect(search).toBeFocused()
  await search.fill('tarrow')
  await expect(page.getByRole('option', { name: /Tarrow Gravels/ })).toBeVisible()
  await page.getByRole('option', { name: /^Tarrow Stream/ }).click()
  await expect(sheet(page, 'Stream').getByRole('heading', { level: 1, name: 'Tarrow' })).toBeVisible()

  await search.fill('V-0001')
  await expect(page.getByRole('option', { name: /^V-0001/ }).first()).toBeVisible()
  await search.press('Enter')
  await expect(sheet(page, 'Well').getByRole('heading', { level: 1, name: 'V-0001' })).toBeVisible()

  await search.fill('-38.41, -21.20')
  await page.getByRole('option', { name: /^38\.4100° S, 21\.2000° W/ }).click()
  await expect(page).toHaveURL(/\/map\/place\/-38\.410000,-21\.200000/)
})

test('m opens the map; groups of wells stand for many from afar and open when they are chosen', async ({ page }) => {
  await visitAs(page, 'analyst')
  await page.goto('/account')
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
  await page.keyboard.press('m')
  await expect(page).toHaveURL(/\/map$/)
  await expect(legend(page).getByRole('button', { name: 'firm' })).toBeVisible()
  for (let i = 0; i < 3; i += 1) await page.getByRole('button', { name: 'Zoom out' }).click()
  await expect(legend(page).getByRole('button', { name: 'wells, arc: with a value' })).toBeVisible()
  await layers(page).getByRole('button', { name: 'In view' }).click()
  const groups = layers(page).getByRole('list', { name: 'Groups of wells' })
  await groups.getByRole('button').first().click()
  await expect(groups.or(layers(page).getByRole('list', { name: 'Wells' })).first()).toBeVisible()
  await page.getByRole('button', { name: 'Show the whole region' }).click()
  await expect(legend(page).getByRole('button', { name: 'firm' })).toBeVisible()
})

test('An analyst enters a well at a place of the map, and a slip is caught before it is saved', async ({
  page,
  watch,
}) => {
  // Refused on purpose, twice.
  watch.expect(/status of 400 .*\/api\/wells/)
  await visitAs(page, 'analyst')
  await openMap(page)
  await page.getByRole('link', { name: 'Enter a well' }).click()
  const form = sheet(page, 'New well')
  const code = `E2E-${Date.now()}`
  await form.getByLabel('Code').fill(code)
  await form.getByRole('button', { name: 'Take the place from the map' }).click()
  const map = page.getByRole('application', { name: 'Map' })
  const box = (await map.boundingBox())!
  await map.click({ position: { x: box.width * 0.6, y: box.height / 2 } })
  await expect(form.getByText(/\d\d\.\d{5}° S, \d\d\.\d{5}° W/)).toBeVisible()
  await expect(page).toHaveURL(/\/map\/wells\/new$/)
  await form.getByRole('button', { name: 'Click on the map' }).click()
  const north = await form.getByLabel('North').inputValue()

  await form.getByLabel('North').fill('57478')
  await form.getByRole('button', { name: 'Enter this well' }).click()
  await expect(form.getByText(/lie far outside the area/).first()).toBeVisible()
  await form.getByLabel('North').fill(north)
  await form.getByLabel('Depth', { exact: true }).fill('40')
  await form.getByRole('button', { name: 'Add a screen' }).click()
  await form.getByLabel('Top, below ground').fill('20')
  await form.getByLabel('Bottom, below ground').fill('60')
  await form.getByRole('button', { name: 'Enter this well' }).click()
  await expect(form.getByText('The screen ends at 60 m, but the well is 40 m deep.')).toBeVisible()
  await form.getByLabel('Bottom, below ground').fill('38')
  await form.getByRole('button', { name: 'Enter this well' }).click()
  await expect(sheet(page, 'Well').getByRole('heading', { level: 1, name: code })).toBeVisible()

  await sheet(page, 'Well').getByRole('link', { name: 'Edit' }).click()
  await sheet(page, 'Edit well').getByLabel('Name').fill('By the mill')
  await sheet(page, 'Edit well').getByRole('button', { name: 'Save' }).click()
  await expect(sheet(page, 'Well').getByText(/By the mill/)).toBeVisible()
})

test('A steward embargoes a well, and a reader no longer finds it', async ({ page, browser, baseURL }) => {
  await visitAs(page, 'steward')
  await page.goto('/map/wells/new?at=-38.405000,-21.150000')
  const code = `EMB-${Date.now()}`
  await sheet(page, 'New well').getByLabel('Code').fill(code)
  await sheet(page, 'New well').getByRole('button', { name: 'Enter this well' }).click()
  const well = sheet(page, 'Well')
  await expect(well.getByText('internal')).toBeVisible()
  await well.getByRole('button', { name: 'Visibility' }).click()
  const dialog = page.getByRole('dialog', { name: `Who sees ${code}` })
  await dialog.getByLabel(/^Published/).check()
  await dialog.getByLabel('Hidden from readers until').fill('2031-05-01')
  await dialog.getByRole('button', { name: 'Save' }).click()
  await expect(well.getByText('embargoed until 1 May 2031')).toBeVisible()

  const other = await browser.newPage({ baseURL: baseURL! })
  await visitAs(other, 'reader')
  await other.goto(page.url())
  await expect(other.getByText('Nothing here')).toBeVisible()
  await other.getByRole('combobox', { name: /^Search/ }).fill(code)
  await expect(other.getByText(/^Nothing is called/)).toBeVisible()
  await other.close()
})

for (const { colorScheme, width } of views)
  test(`The map and its sheets are accessible and fit, ${colorScheme} at ${width} px`, async ({ page }) => {
    await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' })
    await page.setViewportSize({ width, height: 800 })
    await visitAs(page, 'steward')
    for (const path of ['/map', '/map/wells/1', '/map/streams/1', '/map/aquifer-units/1', '/map/wells/new']) {
      await page.goto(path)
      await expect(page.getByRole('application', { name: 'Map' })).toBeVisible()
      if (path !== '/map') await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
      await expect(page.getByText(/^Fetching /)).toHaveCount(0)
      await expectAccessible(page)
      await expectNoSidewaysScroll(page)
    }
  })

test('Cards open and close on a phone, and the list in view works there too', async ({ page }) => {
  await page.setViewportSize({ width: 360, height: 740 })
  await visitAs(page, 'reader')
  await page.goto('/map')
  await layers(page).getByRole('button', { name: 'Layers' }).click()
  await layers(page).getByRole('button', { name: 'In view' }).click()
  await expect(layers(page).getByRole('list', { name: 'Streams' })).toBeVisible()
  await expectAccessible(page)
  await layers(page).getByRole('button', { name: 'Layers' }).click()
  await legend(page).getByRole('button', { name: 'Legend' }).click()
  await expect(legend(page).getByRole('button', { name: 'stream' })).toBeVisible()
  await expectAccessible(page)
})
