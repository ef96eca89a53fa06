import { expect, type Page } from '@playwright/test'

/** A seeded test with three observation wells. */
export async function testAddress(page: Page): Promise<string> {
  const answer = await page.request.get('/api/pumping-tests?kind=constant-rate&state=accepted&limit=50')
  const { items } = (await answer.json()) as { items: { id: number; wellCount: number }[] }
  const id = items.find(({ wellCount }) => wellCount >= 4)?.id
  return `/pumping-tests/${id}`
}

/** Such a test with a new straight line on it. */
export async function openTest(page: Page) {
  await page.goto(await testAddress(page))
  await page.getByRole('button', { name: 'New analysis' }).click()
  await page.getByRole('listitem').filter({ hasText: 'Time–drawdown line' }).click()
  await expect(page.getByRole('slider', { name: 'Window begins at' })).toBeVisible()
}
