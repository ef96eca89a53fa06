/** Starts the application over a seeded database of its own, unless BASE_URL names one; returns what stops it. */
export default async function globalSetup(): Promise<(() => Promise<void>) | undefined> {
  if (process.env.BASE_URL) return undefined
  // Only then: it loads the whole server.
  const { startSeededApp } = await import('../../support/seeded-app.ts')
  const { url, stop } = await startSeededApp()
  process.env.BASE_URL = url
  return stop
}
