import { rmSync } from 'node:fs'
import { startInstallation, stopInstallation } from './installation.ts'
import { seededDataFolder } from './seeded-database.ts'

/** The whole program over a copy of the demo region, on a free port, as `npm start` runs it. */
export async function startSeededApp(env: NodeJS.ProcessEnv = {}): Promise<{ url: string; stop(): Promise<void> }> {
  const dataDir = await seededDataFolder()
  const installation = await startInstallation(dataDir, { DEMO: '1', ...env })
  const stop = async () => {
    await stopInstallation(installation)
    rmSync(dataDir, { recursive: true, force: true })
  }
  return { url: installation.address, stop }
}
