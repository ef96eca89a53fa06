import { expect, type Page } from '@playwright/test'
import { expectAccessible, expectNoSidewaysScroll } from './accessible.ts'

/** Both themes, and the three ways in which the frame lies: axe looks at each. */
export const views = [
  { colorScheme: 'light', width: 1440 },
  { colorScheme: 'dark', width: 800 },
  { colorScheme: 'light', width: 320 },
] as const

/** The widest window and a common phone: there a page must only fit. */
const otherWidths = [2560, 360]

/** The page in each theme and width; `ready` waits until it stands in the window that it has now. */
export async function expectFitInEachView(page: Page, ready: () => Promise<void>) {
  for (const { colorScheme, width } of views) {
    await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' })
    await page.setViewportSize({ width, height: 900 })
    await ready()
    await expect(page.locator('.v-application')).toHaveClass(new RegExp(`v-theme--${colorScheme}`))
    await expectAccessible(page)
    await expectNoSidewaysScroll(page)
  }
  for (const width of otherWidths) {
    await page.setViewportSize({ width, height: 900 })
    await ready()
    await expectNoSidewaysScroll(page)
  }
}
