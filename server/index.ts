import { once } from 'node:events'
import { createServer, type Server } from 'node:http'
import { setTimeout as pause } from 'node:timers/promises'
import { ensureFirstAdministratorLink } from './api/password/first-administrator.ts'
import { createApp } from './app.ts'
import { ConfigError, parseConfig } from './config/config.ts'
import { createDeps } from './create-deps.ts'
import { packetProblem } from './db/packet.ts'
import type { Deps } from './deps.ts'
import { startBackgroundWork } from './jobs/background.ts'

const drainMs = 10_000

async function listen(server: Server, port: number, host: string) {
  server.listen(port, host)
  await once(server, 'listening')
}

/** Lets requests in flight end, then cuts what is left (progress streams never end by themselves). */
async function close(server: Server) {
  const closed = new Promise((resolve) => server.close(resolve))
  server.closeIdleConnections()
  await Promise.race([closed, pause(drainMs, undefined, { ref: false })])
  server.closeAllConnections()
}

/** Tells whoever starts an installation without an administrator how to become the first. */
async function greetFirstAdministrator(deps: Deps) {
  const link = await ensureFirstAdministratorLink(deps)
  if (link)
    process.stdout.write(`\nThere is no administrator yet. This link works once and makes you the first:\n${link}\n`)
}

/** A database that takes only short statements serves, until somebody uploads a long log. */
async function warnOfShortPackets({ connection, log }: Deps) {
  const problem = await packetProblem(connection.db)
  if (problem) log.warn(problem)
}

async function main() {
  const config = parseConfig(process.env)
  const deps = await createDeps(config)
  const app = createApp(deps)
  const server = createServer(app)
  const stopWork = startBackgroundWork(deps)
  await listen(server, config.port, config.host)
  deps.log.info({ port: config.port, host: config.host }, 'listening')

  let ending = false
  const end = async () => {
    if (ending) return
    ending = true
    deps.stopping.abort()
    await close(server)
    await stopWork()
    await deps.close()
    process.exit(0)
  }
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, () => void end())
  await warnOfShortPackets(deps).catch((err: unknown) =>
    deps.log.error({ err }, 'the size of statements could not be asked for'),
  )
  await greetFirstAdministrator(deps).catch((err: unknown) =>
    deps.log.error({ err }, 'no link for a first administrator'),
  )
}

main().catch((error: unknown) => {
  process.stderr.write(
    `${error instanceof ConfigError ? error.message : String(error instanceof Error ? error.stack : error)}\n`,
  )
  process.exit(error instanceof ConfigError ? 78 : 1)
})
