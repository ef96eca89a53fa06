import { fileURLToPath } from 'node:url'
import type { Page } from '@playwright/test'
import { expectAccessible, expectNoSidewaysScroll } from './support/accessible.ts'
import { signIn, visitAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'
import { openTest, testAddress } from './support/workbench.ts'

const korendijk = fileURLToPath(new URL('../reference/oude-korendijk.csv', import.meta.url))

/** Chooses a well by its code in a picker. */
async function pickWell(page: Page, label: string, code: string) {
  await page.getByRole('combobox', { name: label }).fill(code)
  await page.getByRole('option', { name: code }).first().click()
}

/** Codes of wells of the demo region that have screens in a unit, so that a test can be made of them. */
async function wellCodes(page: Page): Promise<[pumped: string, observation: string]> {
  const codes = await page.evaluate(async () => {
    const answer = await fetch('/api/pumping-tests?kind=constant-rate&limit=50&sort=start')
    const { items } = (await answer.json()) as { items: { id: number; wellCount: number }[] }
    const chosen = items.find(({ wellCount }) => wellCount >= 2)
    const one = (await (await fetch(`/api/pumping-tests/${chosen?.id}`)).json()) as { wells: { code: string }[] }
    return one.wells.map(({ code }) => code)
  })
  return [codes[0]!, codes[1]!]
}

async function enterTest(page: Page): Promise<string> {
  const [pumped, observation] = await wellCodes(page)
  await page.getByRole('link', { name: 'Tests' }).click()
  await page.getByRole('link', { name: 'New test' }).click()
  await pickWell(page, 'Pumped well', pumped)
  await page.getByLabel('Date', { exact: true }).fill('2019-03-14')
  await page.getByLabel('Pump on at').fill('09:00')
  await page.getByLabel('Rate', { exact: true }).fill('788')
  const unit = page.getByRole('combobox', { name: 'Unit', exact: true })
  await unit.fill('gpm')
  await unit.press('Enter')
  await expect(page.getByText('can mean US gpm or imp gpm')).toBeVisible()
  await unit.fill('m3/d')
  await unit.press('Enter')
  await page.getByRole('button', { name: 'Add an observation well' }).click()
  await pickWell(page, 'Observation well', observation)
  await page.getByLabel('From the pumped well').fill('0')
  await page.getByRole('button', { name: 'Create the test' }).click()
  await expect(page.getByText('must be greater than zero')).toBeVisible()
  await page.getByLabel('From the pumped well').fill('30')
  await page.getByRole('button', { name: 'Create the test' }).click()
  await expect(page).toHaveURL(/\/pumping-tests\/\d+\/readings$/)
  return observation
}

async function uploadReadings(page: Page, code: string) {
  const panel = page.getByRole('region', { name: `Readings of ${code}`, exact: true }).first()
  await panel.getByRole('button', { name: 'Add readings' }).click()
  await panel.getByLabel('File with readings').setInputFiles(korendijk)
  await expect(panel.getByText(/34 readings/)).toBeVisible()
  await panel.getByRole('button', { name: 'Keep these readings' }).click()
  await expect(panel.getByText(/34 of 37 rows taken/)).toBeVisible()
  await panel.getByRole('button', { name: 'Show the rows' }).click()
  await expect(panel.getByRole('cell', { name: '0.25,0.08' })).toBeVisible()
  await expectAccessible(page)
}

/** The transmissivity that the open card shows, m²/d. */
async function shownT(page: Page): Promise<number> {
  const text = await page
    .getByRole('article', { name: /Time–drawdown line/ })
    .locator('dd strong')
    .first()
    .innerText()
  return Number.parseFloat(text.replace(/\s/g, ''))
}

async function dragWindow(page: Page) {
  const edge = page.getByRole('slider', { name: 'Window begins at' })
  const before = await shownT(page)
  const box = (await edge.boundingBox())!
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2)
  await page.mouse.down()
  await page.mouse.move(box.x - 180, box.y + 20, { steps: 12 })
  await page.mouse.up()
  await expect.poll(() => shownT(page)).not.toBe(before)
  const dragged = Number(await edge.getAttribute('aria-valuenow'))
  await edge.focus()
  await page.keyboard.press('ArrowRight')
  await expect.poll(async () => Number(await edge.getAttribute('aria-valuenow'))).toBeGreaterThan(dragged)
}

async function adopted(page: Page, testId: string) {
  return page.evaluate(async (id) => {
    const answer = await fetch(`/api/pumping-tests/${id}/adopted-values`)
    const { items } = (await answer.json()) as { items: { quantity: string; value: number; validTo: string | null }[] }
    return items
      .filter(({ quantity, validTo }) => quantity === 'T' && validTo === null)
      .map(({ value }) => value * 86_400)
  }, testId)
}

test('A log becomes a value of the regional table, from the file to the reviewer', async ({
  page,
  browser,
  baseURL,
  watch,
}) => {
  watch.expect(/400/)
  await signIn(page, 'analyst')
  const observation = await enterTest(page)
  await uploadReadings(page, observation)
  const testId = /pumping-tests\/(\d+)/.exec(page.url())![1]!
  await page.getByRole('link', { name: 'Open the test' }).click()
  await expect(page.getByRole('slider', { name: 'Window begins at' })).toBeVisible()
  await dragWindow(page)

  // By hand, as the handbook reads it: 1.4 to 18 min give 391 m²/d (Kruseman & de Ridder, ILRI 47; from memory).
  const card = page.getByRole('article', { name: /Time–drawdown line/ })
  await card.getByLabel('from', { exact: true }).fill('1.39')
  await card.getByLabel('from', { exact: true }).press('Enter')
  await card.getByLabel('to', { exact: true }).fill('18.01')
  await card.getByLabel('to', { exact: true }).press('Enter')
  await expect.poll(() => shownT(page)).toBe(391)

  await page.reload()
  await expect.poll(() => shownT(page)).toBe(391)
  await card.getByRole('button', { name: 'Save this analysis' }).click()
  await card.getByRole('button', { name: 'Submit for review' }).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByRole('button', { name: 'Submit' }).click()
  await expect(dialog.getByText('Say why this value stands for the test.')).toBeVisible()
  await dialog.getByLabel('Why this value stands for the test').fill('The line follows the handbook.')
  await dialog.getByRole('button', { name: 'Submit' }).click()
  await expect(card.getByText('Waits for review')).toBeVisible()
  await expect(card.getByRole('button', { name: 'Accept' })).toHaveCount(0)
  await expectAccessible(page)

  const theirs = await browser.newPage({ baseURL: baseURL! })
  await signIn(theirs, 'reviewer')
  await theirs.goto(`/pumping-tests/${testId}`)
  await expect(theirs.getByText('the same numbers')).toBeVisible()
  await expect(theirs.getByText('Readers see its value once a steward has published the test.')).toBeVisible()
  await theirs.getByRole('button', { name: 'Accept' }).click()
  await expect(theirs.getByRole('heading', { name: 'In the regional table' })).toBeVisible()
  expect((await adopted(theirs, testId)).map(Math.round)).toEqual([391])
  await theirs.close()
})

/** Draws around all of the plot with the mouse. */
async function drawAround(page: Page) {
  const box = (await page.getByRole('img', { name: /plot of drawdown/ }).boundingBox())!
  const corners = [
    [70, 18],
    [box.width - 22, 18],
    [box.width - 22, box.height - 160],
    [70, box.height - 160],
  ].map(([x, y]) => [box.x + x!, box.y + y!] as const)
  await page.mouse.move(...corners[0]!)
  await page.mouse.down()
  for (const corner of [...corners.slice(1), corners[0]!]) await page.mouse.move(...corner, { steps: 6 })
  await page.mouse.up()
}

test('Readings are left out on the plot with a reason, and taken back', async ({ page, watch }) => {
  watch.expect(/400/)
  await signIn(page, 'analyst')
  const observation = await enterTest(page)
  await uploadReadings(page, observation)
  await page.getByRole('link', { name: 'Open the test' }).click()
  await page.getByRole('button', { name: 'Choose readings' }).click()
  await drawAround(page)
  await expect(page.getByText('34 readings chosen')).toBeVisible()
  await page.getByRole('button', { name: 'Choose none' }).click()
  await page.getByLabel('Readings from').fill('0')
  await page.getByLabel('to', { exact: true }).first().fill('0.3')
  await page.getByRole('button', { name: 'Choose these' }).click()
  await page.getByRole('button', { name: 'Leave out', exact: true }).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByRole('button', { name: 'Leave out' }).click()
  await expect(dialog.getByText('Say why, so that a reviewer can follow.')).toBeVisible()
  await dialog.getByLabel('Reason').fill('The rate was not steady yet.')
  await expectAccessible(page)
  await dialog.getByRole('button', { name: 'Leave out' }).click()
  await expect(page.getByText('are left out.')).toBeVisible()
  await drawAround(page)
  await page.getByRole('button', { name: 'Take back' }).click()
  await dialog.getByLabel('Reason').fill('The rate was steady after all.')
  await dialog.getByRole('button', { name: 'Take back' }).click()
  await expect(page.getByText('are taken back.')).toBeVisible()
  await expectAccessible(page)
})

test('A span of the diagnosis becomes the window, and is undone and redone by keys', async ({ page }) => {
  await visitAs(page, 'analyst')
  await openTest(page)
  const edge = page.getByRole('slider', { name: 'Window begins at' })
  const proposed = (await edge.getAttribute('aria-valuetext'))!
  await page.getByRole('button', { name: 'Use this span: radial flow' }).click()
  await expect(edge).not.toHaveAttribute('aria-valuetext', proposed)
  const used = (await edge.getAttribute('aria-valuetext'))!
  await page.keyboard.press('Control+z')
  await expect(edge).toHaveAttribute('aria-valuetext', proposed)
  await page.keyboard.press('Control+Shift+z')
  await expect(edge).toHaveAttribute('aria-valuetext', used)
  await page.getByRole('button', { name: 'Undo the last change' }).click()
  await expect(edge).toHaveAttribute('aria-valuetext', proposed)
  await expectAccessible(page)
})

test('The line is drawn by hand with the keyboard, and goes back to least squares', async ({ page }) => {
  await visitAs(page, 'analyst')
  await openTest(page)
  const end = page.getByRole('slider', { name: /^Line at/ }).last()
  await end.focus()
  await page.keyboard.press('Shift+ArrowDown')
  await expect(page.getByText('Line drawn by hand', { exact: true })).toBeVisible()
  await expect(page.getByText(/The line was drawn by hand/)).toBeVisible()
  await page.getByRole('button', { name: 'Back to least squares' }).click()
  await expect(page.getByText('Line by least squares')).toBeVisible()
})

test('Every plot of a test is drawn, read as a table and saved', async ({ page }) => {
  await visitAs(page, 'analyst')
  await openTest(page)
  const plot = page.getByRole('region', { name: 'Plot', exact: true })
  for (const kind of ['Linear', 'Log–log', 'Recovery', 'Composite t/r²', 'Distance', 'Semi-log']) {
    await plot.getByRole('button', { name: kind, exact: true }).click()
    await expect(
      plot
        .getByRole('img', { name: new RegExp(`^${kind} plot of drawdown`) })
        .locator('svg path')
        .nth(20),
    ).toBeAttached()
  }
  await page.getByRole('button', { name: 'Read as a table' }).click()
  await expect(page.getByRole('columnheader', { name: /time since pumping began, min/ })).toBeVisible()
  await expectAccessible(page)
  for (const [way, ending] of [
    ['PNG picture', /\.png$/],
    ['SVG drawing', /\.svg$/],
    ['CSV table', /\.csv$/],
  ] as const) {
    await page.getByRole('button', { name: 'Save', exact: true }).click()
    const [download] = await Promise.all([page.waitForEvent('download'), page.getByText(way).click()])
    expect(download.suggestedFilename()).toMatch(ending)
  }
})

test('A barrier is taken into a curve, drawn on the sketch, and the analyses are compared', async ({ page }) => {
  await visitAs(page, 'analyst')
  await page.goto(await testAddress(page))
  await page.getByRole('button', { name: 'New analysis' }).click()
  await expect(page.getByText('Straight lines', { exact: true })).toBeVisible()
  await page
    .getByRole('listitem')
    .filter({ hasText: /^Confined aquifer curve/ })
    .click()
  const card = page.getByRole('article', { name: /^Confined aquifer curve/ })
  await card.getByRole('button', { name: 'Add a barrier' }).click()
  const barrier = card.getByRole('group', { name: 'Barrier', exact: true })
  await expect(barrier.getByLabel(/^Fit the distance/)).toBeChecked()
  await expect(card.getByText('barrier', { exact: true })).toBeVisible()
  await barrier.getByLabel(/^Fit the distance/).uncheck()
  await barrier.getByLabel('Distance', { exact: true }).fill('250')
  await barrier.getByLabel('Distance', { exact: true }).press('Enter')
  await barrier.getByLabel('Direction').fill('135')
  await barrier.getByLabel('Direction').press('Enter')
  await expect(barrier.getByText('south-east')).toBeVisible()
  await expect(
    page.getByRole('img', { name: /Barrier, a barrier of the analysis, lies 250 m to the south-east/ }),
  ).toBeVisible()

  await page.getByRole('tab', { name: 'Comparison' }).click()
  const comparison = page.getByRole('region', { name: 'Comparison', exact: true })
  await expect(comparison.getByRole('row').filter({ hasText: 'Confined aquifer curve' }).first()).toBeVisible()
  await expect(comparison.getByText(/compares fits, not geology/)).toBeVisible()
  await expect(
    comparison
      .getByRole('img', { name: /^Drawdown with curves of/ })
      .locator('svg path')
      .nth(10),
  ).toBeAttached()
  await comparison.getByRole('button', { name: 'Read the curves as a table' }).click()
  await expect(comparison.getByRole('columnheader', { name: /time since pumping began, min/ })).toBeVisible()
  await expectAccessible(page)
})

test('A curve is laid over the readings by hand, by mouse and keys, and the change is undone', async ({ page }) => {
  await visitAs(page, 'analyst')
  await page.goto(await testAddress(page))
  await page.getByRole('button', { name: 'New analysis' }).click()
  await page
    .getByRole('listitem')
    .filter({ hasText: /^Leaky aquifer curve \(/ })
    .click()
  const card = page.getByRole('article', { name: /^Leaky aquifer curve/ })
  await card.getByRole('button', { name: 'Lay the curve by hand' }).click()
  await expect(card.getByText(/The curve was laid over the readings by hand/)).toBeVisible()
  const [T, B] = [
    card.getByLabel('Transmissivity', { exact: true }),
    card.getByLabel('Leakage factor', { exact: true }),
  ]
  const found = await T.inputValue()

  const curve = page.getByRole('application', { name: 'Curve laid by hand' })
  const box = (await curve.boundingBox())!
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2)
  await page.mouse.down()
  await page.mouse.move(box.x + box.width / 2 + 20, box.y + box.height / 2 + 30, { steps: 6 })
  await page.mouse.up()
  await expect.poll(async () => Number(await T.inputValue())).toBeGreaterThan(Number(found))
  await page.keyboard.press('Control+z')
  await expect(T).toHaveValue(found)
  await curve.focus()
  await page.keyboard.press('Shift+ArrowUp')
  await expect.poll(async () => Number(await T.inputValue())).toBeLessThan(Number(found))
  const raised = await T.inputValue()
  const leakage = Number(await B.inputValue())
  await card.getByRole('button', { name: 'Leakage factor: next curve up' }).click()
  await expect.poll(async () => Number(await B.inputValue()) / leakage).toBeCloseTo(10 ** 0.1, 2)
  await expect(T).toHaveValue(raised)
  await expectAccessible(page)
  await card.getByRole('button', { name: 'Save this analysis' }).click()
  await expect(card.getByRole('button', { name: 'Submit for review' })).toBeVisible()
  await card.getByRole('button', { name: 'Delete' }).click()
  await page.getByRole('alertdialog').getByRole('button', { name: 'Delete' }).click()
  await expect(page.getByText('The draft is deleted.')).toBeVisible()
})

const pages: Record<string, (address: string) => string> = {
  'list of tests': () => '/pumping-tests',
  'form of a new test': () => '/pumping-tests/new',
  'form of a test': (address) => `${address}/edit`,
  'readings of a test': (address) => `${address}/readings`,
  workbench: (address) => address,
  'comparison of analyses': (address) => `${address}?part=comparison`,
  'forecast of a test': (address) => `${address}?part=forecast`,
  'corrections of a test': (address) => `${address}?part=corrections`,
  'wells and conditions of a test': (address) => `${address}?part=test`,
}

for (const [name, pathOf] of Object.entries(pages)) {
  test(`The ${name} fits the narrowest window in the dark theme`, async ({ page }) => {
    await visitAs(page, 'analyst')
    await page.setViewportSize({ width: 320, height: 700 })
    await page.emulateMedia({ colorScheme: 'dark' })
    await page.goto(pathOf(await testAddress(page)))
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
    await expectNoSidewaysScroll(page)
    await expectAccessible(page)
  })
}
