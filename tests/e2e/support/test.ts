import { test as base } from '@playwright/test'
import { watchPage, type Watch } from './watch.ts'

export { expect } from '@playwright/test'

interface Fixtures {
  watch: Watch
}

/**
 * `test` of every browser test: it fails when the page wrote an error, broke the content policy, met a server error
 * or asked another origin. `watch.expect(/…/)` before a provoked one.
 */
export const test = base.extend<Fixtures>({
  // Given at run time, because the global setup learns the address only when the application listens.
  // eslint-disable-next-line no-empty-pattern -- Playwright reads the names of the fixtures from a pattern.
  baseURL: async ({}, use) => {
    const url = process.env.BASE_URL
    if (!url) throw new Error('BASE_URL is not set: run through tests/e2e/playwright.config.ts')
    await use(url)
  },
  watch: [
    async ({ page, baseURL }, use) => {
      const watch = await watchPage(page, new URL(baseURL!).origin)
      await use(watch)
      if (watch.complaints.length > 0) throw new Error(`The page complained:\n${watch.complaints.join('\n')}`)
    },
    { auto: true },
  ],
})
