import { AxeBuilder } from '@axe-core/playwright'
import { expect, type Page } from '@playwright/test'

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice']

/**
 * Popups (lists of choices, menus) hang in a container of Vuetify's outside all landmarks. They are reached through
 * the control that opens them, so the best practice of landmarks does not serve anybody there.
 */
const inPopup = (rule: string, targets: string[]) =>
  rule === 'region' && targets.every((target) => target.includes('.v-overlay'))

/** Rows of a table are alike; axe takes a second for a dozen of them. */
const FURTHER_ROWS = 'tbody tr:nth-child(n + 13)'

/**
 * axe finds nothing on the page as it stands; what it found is listed with its elements.
 * It works inside the page, which has no frames, and lists what is wrong only: the rest takes most of its time.
 * From the top of the page: a control that is just being scrolled under the bar is not a small one.
 */
export async function expectAccessible(page: Page) {
  await page.evaluate(() => window.scrollTo(0, 0))
  const { violations } = await new AxeBuilder({ page })
    .setLegacyMode()
    .options({ runOnly: { type: 'tag', values: TAGS }, resultTypes: ['violations'] })
    .exclude(FURTHER_ROWS)
    .analyze()
  const relevant = violations.filter(
    ({ id, nodes }) =>
      !inPopup(
        id,
        nodes.map(({ target }) => target.join(' ')),
      ),
  )
  const found = relevant.map(({ id, help, nodes }) => ({
    rule: `${id}: ${help}`,
    where: nodes.map(({ target, failureSummary }) => `${target.join(' ')} – ${failureSummary?.split('\n')[1]?.trim()}`),
  }))
  expect(found).toEqual([])
}

/** Nothing sticks out of the window sideways. */
export async function expectNoSidewaysScroll(page: Page) {
  const { wide, window } = await page.evaluate(() => ({
    wide: document.documentElement.scrollWidth,
    window: document.documentElement.clientWidth,
  }))
  expect(wide).toBeLessThanOrEqual(window)
}
