import type { Locator, Page } from '@playwright/test'
import { visitAs } from './support/sign-in.ts'
import { expect, test } from './support/test.ts'
import { openTest } from './support/workbench.ts'

test.use({ hasTouch: true, viewport: { width: 800, height: 1100 } })

/** Drags with one finger, as the browser itself sees it: Playwright's own touch screen only taps. */
async function dragByFinger(page: Page, from: Locator, by: { x: number; y: number }) {
  const box = (await from.boundingBox())!
  const start = { x: box.x + box.width / 2, y: box.y + box.height / 2 }
  const finger = await page.context().newCDPSession(page)
  const touch = (type: 'touchStart' | 'touchMove' | 'touchEnd', touchPoints: { x: number; y: number }[]) =>
    finger.send('Input.dispatchTouchEvent', { type, touchPoints })
  await touch('touchStart', [start])
  for (let step = 1; step <= 10; step++) {
    await touch('touchMove', [{ x: start.x + (by.x * step) / 10, y: start.y + (by.y * step) / 10 }])
  }
  await touch('touchEnd', [])
  await finger.detach()
}

test('A window is moved by a finger, while the page stays where it is', async ({ page }) => {
  await visitAs(page, 'analyst')
  await openTest(page)
  const edge = page.getByRole('slider', { name: 'Window begins at' })
  await edge.scrollIntoViewIfNeeded()
  const value = async () => Number(await edge.getAttribute('aria-valuenow'))
  const [before, place] = [await value(), await page.evaluate(() => scrollY)]
  await dragByFinger(page, edge, { x: -120, y: -60 })
  await expect.poll(value).toBeLessThan(before)
  expect(await page.evaluate(() => scrollY)).toBe(place)
})
