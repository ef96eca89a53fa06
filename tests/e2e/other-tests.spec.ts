import { fileURLToPath } from 'node:url'
import type { Page } from '@playwright/test'
import { expectAccessible } from './support/accessible.ts'
import { choose } from './support/choose.ts'
import { signIn, visitAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

const dawsonville = fileURLToPath(new URL('../reference/dawsonville.csv', import.meta.url))

/** A well of the demo region that has been pumped, so that it has screens in a unit. */
async function wellCode(page: Page): Promise<string> {
  const answer = await page.request.get('/api/pumping-tests?kind=constant-rate&limit=1&sort=start')
  const { items } = (await answer.json()) as { items: { wellCode: string }[] }
  return items[0]!.wellCode
}

async function newTest(page: Page, kind: string, well: string) {
  await page.getByRole('link', { name: 'Tests' }).click()
  await page.getByRole('link', { name: 'New test' }).click()
  await choose(page, page, 'Kind of test', kind)
  const label = kind === 'Slug test' ? 'Well' : 'Pumped well'
  await page.getByRole('combobox', { name: label, exact: true }).fill(well)
  await page.getByRole('option', { name: well }).first().click()
  await page.getByLabel('Date', { exact: true }).fill('2019-03-14')
}

const fill = async (page: Page, values: Record<string, string>) => {
  for (const [label, value] of Object.entries(values)) await page.getByLabel(label, { exact: true }).fill(value)
}

/** By mouse and by key: the first analysis draws its line between two heads, which are edges on the plot. */
async function moveHeads(page: Page) {
  const edge = page.getByRole('slider', { name: 'Line begins at a head of' })
  const head = async () => Number(await edge.getAttribute('aria-valuenow'))
  const before = await head()
  const box = (await edge.boundingBox())!
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2)
  await page.mouse.down()
  await page.mouse.move(box.x + box.width / 2, box.y - 60, { steps: 6 })
  await page.mouse.up()
  await expect.poll(head).toBeGreaterThan(before)
  await page.keyboard.press('Control+z')
  await expect.poll(head).toBe(before)
  await edge.focus()
  await page.keyboard.press('Shift+ArrowDown')
  await expect.poll(head).toBeLessThan(before)
}

const created = (page: Page) => page.getByRole('button', { name: 'Create the test' }).click()

test('A slug test becomes conductivity in the regional table, from its file to the reviewer', async ({
  page,
  browser,
  baseURL,
  watch,
}) => {
  watch.expect(/400/)
  await signIn(page, 'analyst')
  const well = await wellCode(page)
  await newTest(page, 'Slug test', well)
  await expect(page.getByRole('heading', { name: 'Rates' })).toHaveCount(0)
  await page.getByLabel('First slug at').fill('09:00')
  await fill(page, { 'Radius of the casing, inside': '' })
  await created(page)
  await expect(page).toHaveURL(/\/new/)
  // The well near Dawsonville, Georgia: Cooper, Bredehoeft & Papadopulos 1967, from memory.
  await fill(page, {
    'Radius of the casing, inside': '0.076',
    'Radius of the bore': '0.076',
    'Radius of the screen': '0.076',
    'Length of the screen': '98',
    'Top of the screen below the static level': '15',
    Thickness: '98',
  })
  await expectAccessible(page)
  await created(page)
  await expect(page).toHaveURL(/\/pumping-tests\/\d+\/readings$/)
  const testId = /pumping-tests\/(\d+)/.exec(page.url())![1]!
  const panel = page.getByRole('region', { name: `Readings of ${well}`, exact: true }).first()
  await panel.getByRole('button', { name: 'Add readings' }).click()
  await panel.getByLabel('File with readings').setInputFiles(dawsonville)
  await panel.getByRole('button', { name: 'Keep these readings' }).click()
  await expect(panel.getByText(/repeat 1/)).toBeVisible()
  await page.getByRole('link', { name: 'Open the test' }).click()

  await moveHeads(page)
  await page.getByRole('button', { name: 'New analysis' }).click()
  await page.getByRole('listitem').filter({ hasText: 'Cooper, Bredehoeft' }).click()
  await page.getByRole('alertdialog').getByRole('button', { name: 'Drop it' }).click()
  const card = page.getByRole('article', { name: /Cooper, Bredehoeft/ })
  await expect(card.getByText('The storativity of a slug test is kept and not used.')).toBeVisible()
  await expect(page.getByRole('img', { name: /^Plot of head over first displacement/ })).toBeVisible()
  await expectAccessible(page)
  await page.reload()
  await card.getByRole('button', { name: 'Save this analysis' }).click()
  await card.getByRole('button', { name: 'Submit for review' }).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByLabel('Why this value stands for the test').fill('The curve with storage follows all readings.')
  await dialog.getByRole('button', { name: 'Submit' }).click()
  await expect(card.getByText('Waits for review')).toBeVisible()

  const theirs = await browser.newPage({ baseURL: baseURL! })
  await signIn(theirs, 'reviewer')
  await theirs.goto(`/pumping-tests/${testId}`)
  await theirs.getByRole('button', { name: 'Accept' }).click()
  await expect(theirs.getByRole('heading', { name: 'In the regional table' })).toBeVisible()
  const answer = await theirs.request.get(`/api/pumping-tests/${testId}/adopted-values`)
  const { items } = (await answer.json()) as { items: { quantity: string; value: number; evidence: string }[] }
  const K = items.find(({ quantity }) => quantity === 'K')!
  expect(K.evidence).toBe('slight')
  // 5.3 cm²/s over 98 m by type curve; least squares over all readings comes near.
  expect(K.value / (5.3e-4 / 98)).toBeGreaterThan(0.8)
  expect(K.value / (5.3e-4 / 98)).toBeLessThan(1.25)
  await theirs.close()
})

test('A specific capacity gives transmissivity at once, with its caution', async ({ page }) => {
  await visitAs(page, 'analyst')
  await page.goto('/')
  await newTest(page, 'Specific capacity', await wellCode(page))
  await page.getByLabel('Pump on at').fill('09:00')
  await fill(page, {
    Rate: '6',
    'Pumped for': '480',
    'Drawdown in the well': '4',
    'Radius of the well': '0.15',
  })
  await created(page)
  await expect(page.getByRole('article', { name: /Specific capacity to transmissivity/ })).toBeVisible()
  await expect(page.getByText(/No well loss is taken off/)).toBeVisible()
  await expect(page.getByRole('link', { name: 'Readings' })).toHaveCount(0)
  await expectAccessible(page)
})

/** Four steps of an hour with B = 150 + 40·log10 t s/m² and C = 1200 s²/m⁵, hence s = B·Q + C·Q² exactly. */
function stepLog(): string {
  const rates = [0.01, 0.016, 0.022, 0.03]
  const drawdown = (t: number) => {
    const begun = rates.flatMap((rate, i) =>
      t > 3600 * i ? [{ rise: rate - (rates[i - 1] ?? 0), since: t - 3600 * i }] : [],
    )
    const linear = begun.reduce((sum, { rise, since }) => sum + rise * (150 + 40 * Math.log10(since)), 0)
    return linear + 1200 * rates[begun.length - 1]! ** 2
  }
  const times = Array.from({ length: 240 }, (_, i) => 60 * (i + 1))
  return ['minutes,drawdown (m)', ...times.map((t) => `${t / 60},${drawdown(t).toFixed(4)}`)].join('\n')
}

test('A step test becomes the losses of its well, from its file to the reviewer', async ({
  page,
  browser,
  baseURL,
}) => {
  await signIn(page, 'analyst')
  const well = await wellCode(page)
  await newTest(page, 'Step-drawdown test', well)
  await page.getByLabel('Pump on at').fill('09:00')
  const litres = ['10', '16', '22', '30']
  for (const [i, rate] of litres.entries()) {
    if (i > 0) await page.getByRole('button', { name: 'Add a step' }).click()
    await page
      .getByLabel('From', { exact: true })
      .nth(i)
      .fill(String(60 * i))
    await page.getByLabel('Rate', { exact: true }).nth(i).fill(rate)
  }
  await created(page)
  await expect(page).toHaveURL(/\/pumping-tests\/\d+\/readings$/)
  const testId = /pumping-tests\/(\d+)/.exec(page.url())![1]!
  const panel = page.getByRole('region', { name: `Readings of ${well}`, exact: true }).first()
  await panel.getByRole('button', { name: 'Add readings' }).click()
  const file = { name: 'steps.csv', mimeType: 'text/csv', buffer: Buffer.from(stepLog()) }
  await panel.getByLabel('File with readings').setInputFiles(file)
  await panel.getByRole('button', { name: 'Keep these readings' }).click()
  await page.getByRole('link', { name: 'Open the test' }).click()

  const card = page.getByRole('article', { name: /^Step drawdown, linear/ })
  await expect(card.getByText(/^1.200 s²\/m⁵$/)).toBeVisible()
  await card.getByLabel('Rate to predict').fill('25')
  await card.getByLabel('Rate to predict').press('Enter')
  await expect(card.getByText(/^At 25/)).toBeVisible()
  await page.getByRole('button', { name: 'Undo the last change' }).click()
  await expect(card.getByText(/^At 25/)).toHaveCount(0)
  await expectAccessible(page)
  await card.getByRole('button', { name: 'Save this analysis' }).click()
  await card.getByRole('button', { name: 'Submit for review' }).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByLabel('Why these losses stand for the well').fill('All four steps lie on the line.')
  await dialog.getByRole('button', { name: 'Submit' }).click()
  await expect(card.getByText('Waits for review')).toBeVisible()

  const theirs = await browser.newPage({ baseURL: baseURL! })
  await signIn(theirs, 'reviewer')
  await theirs.goto(`/pumping-tests/${testId}`)
  await theirs.getByRole('button', { name: 'Accept' }).click()
  await expect(theirs.getByText('The analysis is accepted, and kept with its well.')).toBeVisible()
  await theirs.getByRole('link', { name: 'Well', exact: true }).click()
  await expect(theirs.getByText(/1.200 s²\/m⁵/).first()).toBeVisible()
  await theirs.close()
})
