import type { Page } from '@playwright/test'

export interface Watch {
  /** Everything that a page must not do, as sentences. */
  complaints: string[]
  /** A complaint that the test provokes on purpose: a server that was killed, a refused request. */
  expect: (pattern: RegExp) => void
}

const refusedByPolicy = `
  addEventListener('securitypolicyviolation', ({ violatedDirective, blockedURI }) => {
    console.error('Content policy: ' + violatedDirective + ' refused ' + blockedURI)
  })
`

/** Listens from before the first request on. */
export async function watchPage(page: Page, origin: string): Promise<Watch> {
  const complaints: string[] = []
  const expected: RegExp[] = []
  const complain = (sentence: string) => {
    if (!expected.some((pattern) => pattern.test(sentence))) complaints.push(sentence)
  }
  await page.addInitScript(refusedByPolicy)
  page.on('pageerror', (error) => complain(`Page error: ${error.message}`))
  page.on('console', (message) => {
    if (message.type() === 'error') complain(`Console error: ${message.text()} (${message.location().url})`)
  })
  page.on('response', (response) => {
    if (response.status() >= 500) complain(`Answer ${response.status()} from ${response.url()}`)
  })
  page.on('request', (request) => {
    const { protocol, origin: asked } = new URL(request.url())
    if (protocol.startsWith('http') && asked !== origin) complain(`Request off origin: ${request.url()}`)
  })
  return { complaints, expect: (pattern) => void expected.push(pattern) }
}
