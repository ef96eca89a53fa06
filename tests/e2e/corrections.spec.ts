import { Buffer } from 'node:buffer'
import type { Page } from '@playwright/test'
import { expectAccessible, expectNoSidewaysScroll } from './support/accessible.ts'
import { visitAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'

interface Inputs {
  inputs: { series: { label: string; elapsed_s: number[] }[] }
}

/** The corrections of a test of the demo region with readings of several wells that nobody has submitted anything of. */
async function openTest(page: Page) {
  const answer = await page.request.get('/api/pumping-tests?kind=constant-rate&state=open&limit=50')
  const { items } = (await answer.json()) as { items: { id: number; wellCount: number }[] }
  const { id } = items.find(({ wellCount }) => wellCount >= 2)!
  const { inputs } = (await (await page.request.get(`/api/pumping-tests/${id}/inputs`)).json()) as Inputs
  await page.goto(`/pumping-tests/${id}?part=corrections`)
  return inputs.series
}

/** A barometer over the readings and more, in hours and hPa: pressure falls as a storm comes. */
function barometer(series: Inputs['inputs']['series']): Buffer {
  const times = series.flatMap(({ elapsed_s }) => [Math.min(...elapsed_s), Math.max(...elapsed_s)])
  const [from, to] = [Math.floor(Math.min(0, ...times) / 3600) - 2, Math.ceil(Math.max(...times) / 3600) + 2]
  const rows = Array.from(
    { length: to - from + 1 },
    (_, i) => `${from + i},${(1015 - 0.3 * i + Math.sin(i)).toFixed(2)}`,
  )
  return Buffer.from(['time (h),pressure (hPa)', ...rows].join('\n'))
}

test('Readings are corrected by an uploaded barometer, the analysis says so, and all of it is taken back', async ({
  page,
  watch,
}) => {
  watch.expect(/400|409/)
  await visitAs(page, 'analyst')
  const series = await openTest(page)
  const panel = page.getByRole('region', { name: 'Corrections', exact: true })

  await panel.getByRole('button', { name: 'Add a series' }).click()
  const upload = panel.getByRole('region', { name: 'New series' })
  const still = Buffer.from('time (h),pressure (hPa)\n-1,1013\n0,1013\n9,1013')
  await upload
    .getByLabel('File with the series')
    .setInputFiles({ name: 'still.csv', mimeType: 'text/csv', buffer: still })
  await upload.getByRole('button', { name: 'Keep this series' }).click()
  await expect(upload.getByText('values are the same, so the series corrects nothing')).toBeVisible()
  const file = { name: 'storm.csv', mimeType: 'text/csv', buffer: barometer(series) }
  await upload.getByLabel('File with the series').setInputFiles(file)
  await expect(upload.getByRole('cell', { name: /,1015\.00$/ })).toBeVisible()
  await upload.getByLabel('Name', { exact: true }).fill('Storm')
  await expectAccessible(page)
  await upload.getByRole('button', { name: 'Keep this series' }).click()
  const storm = panel.getByRole('article', { name: 'Storm', exact: true })
  await storm.getByRole('button', { name: 'Show the rows' }).click()
  await expect(storm.getByRole('cell', { name: /,1015\.00$/ })).toBeVisible()

  await panel.getByRole('button', { name: 'Correct readings' }).click()
  const form = panel.getByRole('form', { name: 'New correction' })
  await form.getByRole('combobox', { name: 'Correct for' }).selectOption('Air pressure')
  await form.getByRole('combobox', { name: 'Its figures are' }).selectOption('Given')
  await form.getByLabel('Efficiency').fill('0.5')
  await form.getByLabel('Efficiency').press('Enter')
  const correction = panel.getByRole('article', { name: 'Air pressure: Storm' })
  await expect(correction.getByText('efficiency 0.5, no lag, as given').first()).toBeVisible()
  await expect(
    panel
      .getByRole('img', { name: /as measured and corrected/ })
      .locator('svg path')
      .nth(10),
  ).toBeAttached()
  await panel.getByRole('button', { name: 'Read as tables' }).click()
  await expect(panel.getByRole('columnheader', { name: /air pressure, kPa/ })).toBeVisible()
  await panel.getByRole('button', { name: 'Show the plots' }).click()
  await page.getByRole('tab', { name: 'Analyses' }).click()
  await expect(page.getByText(/are corrected for air pressure by Storm: efficiency 0.5/).first()).toBeVisible()
  await page.goBack()

  await page.setViewportSize({ width: 360, height: 760 })
  await page.emulateMedia({ colorScheme: 'dark' })
  await expectNoSidewaysScroll(page)
  await expectAccessible(page)

  await correction.getByRole('button', { name: 'Switch off' }).click()
  await expect(correction.getByRole('button', { name: 'Switch on' })).toBeVisible()
  await page.getByRole('tab', { name: 'Analyses' }).click()
  await expect(page.getByRole('article').getByRole('definition').first()).toBeVisible()
  await expect(page.getByText(/are corrected for air pressure by Storm/)).toHaveCount(0)
  await page.getByRole('tab', { name: 'Corrections' }).click()
  await storm.getByRole('button', { name: 'Delete Storm' }).click()
  const dialog = page.getByRole('alertdialog')
  await dialog.getByRole('button', { name: 'Delete' }).click()
  await expect(storm.getByText('A correction follows this series.')).toBeVisible()
  await correction.getByRole('button', { name: /^Remove/ }).click()
  await dialog.getByRole('button', { name: 'Remove' }).click()
  await expect(correction).toHaveCount(0)
  await storm.getByRole('button', { name: 'Delete Storm' }).click()
  await dialog.getByRole('button', { name: 'Delete' }).click()
  await expect(storm).toHaveCount(0)
})

test('Another pumping well is listed by distance and direction, superposed by a curve, and removed', async ({
  page,
}) => {
  await visitAs(page, 'analyst')
  await openTest(page)
  const panel = page.getByRole('region', { name: 'Corrections', exact: true })
  await panel.getByRole('button', { name: 'Add a pumping well' }).click()
  const form = panel.getByRole('form', { name: 'Another pumping well' })
  await form.getByRole('combobox', { name: 'Its place is' }).selectOption('Distance and direction')
  await form.getByLabel('From the pumped well').fill('400')
  await form.getByLabel('Direction').fill('90')
  await form.getByLabel('Name').fill('Dairy')
  await form.getByLabel('From', { exact: true }).fill('-60')
  await form.getByLabel('Rate', { exact: true }).fill('3')
  await expectAccessible(page)
  await form.getByRole('button', { name: 'Add this well' }).click()
  const other = panel.getByRole('article', { name: 'Pumping well Dairy' })
  await expect(other.getByText('400 m to the east')).toBeVisible()
  await page.getByRole('tab', { name: 'Analyses' }).click()
  await expect(
    page.getByText(/Dairy pumped too, and this method|drawdown by Dairy is superposed/).first(),
  ).toBeVisible()
  await page.goBack()
  await other.getByRole('button', { name: /^Remove/ }).click()
  await page.getByRole('alertdialog').getByRole('button', { name: 'Remove' }).click()
  await expect(other).toHaveCount(0)
})
