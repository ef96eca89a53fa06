import { chromium, type Browser, type Page } from '@playwright/test'
import { demoAccount } from '../e2e/support/sign-in.ts'
import { report } from '../support/bench.ts'
import { startSeededApp } from '../support/seeded-app.ts'
import { longTest } from '../support/long-test.ts'

/** Frames a second in Chromium while an edge of the window is dragged over 20,000 readings, beside an empty page's. */
const readings = 20_000
const steps = 240
const viewport = { width: 1280, height: 800 }

async function newPage(browser: Browser): Promise<Page> {
  const page = await browser.newPage({ viewport })
  // tsx marks named functions with a helper that the page does not have.
  await page.addInitScript('globalThis.__name ??= (named) => named')
  return page
}

/** Drags to and fro between two places while counting frames. */
async function framesPerSecond(page: Page, { x, y }: { x: number; y: number }, width: number): Promise<number> {
  await page.mouse.move(x, y)
  await page.mouse.down()
  await page.evaluate(() => {
    const counted = { frames: 0, begin: performance.now() }
    Object.assign(window, { counted })
    const tick = () => {
      counted.frames += 1
      requestAnimationFrame(tick)
    }
    requestAnimationFrame(tick)
  })
  for (let step = 1; step <= steps; step += 1)
    await page.mouse.move(x + (width * (1 - Math.cos((step / steps) * 4 * Math.PI))) / 2, y)
  const rate = await page.evaluate(() => {
    const { counted } = window as unknown as { counted: { frames: number; begin: number } }
    return (1000 * counted.frames) / (performance.now() - counted.begin)
  })
  await page.mouse.up()
  return rate
}

async function onTest(browser: Browser, url: string): Promise<number> {
  const page = await newPage(browser)
  await page.goto(`${url}/sign-in`)
  const { email, password } = demoAccount('analyst')
  await page.getByLabel('E-mail address').fill(email)
  await page.getByLabel('Password', { exact: true }).fill(password)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.getByRole('button', { name: /: your menu$/ }).waitFor()
  const id = await longTest(page, readings)
  await page.goto(`${url}/pumping-tests/${id}`)
  const edge = page.getByRole('slider', { name: 'Window begins at' })
  await edge.waitFor()
  const before = await edge.getAttribute('aria-valuenow')
  const box = (await edge.boundingBox())!
  const rate = await framesPerSecond(page, { x: box.x + box.width / 2, y: box.y + box.height / 2 }, -160)
  if ((await page.getByText(`of 20,000`).or(page.getByText(`of 20\u202f000`)).count()) === 0)
    throw new Error('The plot does not hold 20,000 readings')
  await page.keyboard.press('ArrowLeft')
  if ((await edge.getAttribute('aria-valuenow')) === before) throw new Error('The window did not move')
  return rate
}

const { url, stop } = await startSeededApp()
const browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: ['--no-sandbox', '--disable-gpu'] })
try {
  const rate = await onTest(browser, url)
  const blank = await newPage(browser)
  await blank.goto(`${url}/healthz`)
  const value = await framesPerSecond(blank, { x: 600, y: 300 }, -160)
  report('drag-window', 'frames per second while the window is dragged over 20,000 readings', rate, '1/s', {
    name: 'an empty page of the same server under the same mouse',
    value,
  })
} finally {
  await browser.close()
  await stop()
}
