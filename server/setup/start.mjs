import { setTimeout as delay } from 'node:timers/promises'
import { buildClient, clientIsBuilt } from './client-build.mjs'
import { demoAccounts } from './demo-accounts.mjs'
import { checkedPort } from './free-port.mjs'
import { aborted, runCommand } from './lifecycle.mjs'
import { inRoot, root } from './places.mjs'
import { marker, prepare } from './prepare.mjs'
import { SetupProblem } from './problem.mjs'
import { endProcess, ended, startChild } from './processes.mjs'
import { makeSteps, seconds } from './steps.mjs'
import { keepRunning } from './supervise.mjs'

/** The application drains for 10 s. */
const stopLimitMs = 15_000
const readyLimitMs = 60_000

await runCommand(async (life) => {
  const begun = performance.now()
  const steps = makeSteps()
  const { settings, config, database, env } = await prepare(steps, life)
  if (!clientIsBuilt(config.clientDir)) {
    await steps.step('Building the pages', () => buildClient(config.clientDir, life.stopping))
  }
  const port = await checkedPort(config.port, config.host)
  const start = application({ LOG_LEVEL: 'warn', ...env, PORT: String(port) }, settings.dataDir, life)
  const options = { stopping: life.stopping, say: steps.say }
  const running = Promise.race([
    aborted(life.stopping),
    database.keepRunning(options),
    keepRunning('The application', start, options),
  ])
  const address = `http://${localHost(config.host)}:${port}`
  await steps.step('Starting the application', () => Promise.race([running, ready(address, life.stopping)]))
  if (life.stopping.aborted) return
  const shown = process.env.PUBLIC_URL?.trim() || address
  steps.say(`\nBasinbook is ready at ${shown} after ${seconds(performance.now() - begun)}. Ctrl-C stops it.`)
  if (settings.demo) steps.say(demoAccounts())
  await running
})

/**
 * @param {NodeJS.ProcessEnv} env
 * @param {string} dataDir
 * @param {import('./lifecycle.mjs').Life} life
 */
function application(env, dataDir, { onClose }) {
  /** @type {number | undefined} */
  let pid
  onClose(async () => {
    if (pid) await endProcess(pid, stopLimitMs)
  })
  return () => {
    const child = startChild(process.execPath, ['--import', 'tsx', inRoot('server/index.ts'), marker(dataDir)], {
      cwd: root,
      env,
      stdio: ['ignore', 'inherit', 'inherit'],
    })
    pid = child.pid
    return { ended: ended(child) }
  }
}

/**
 * An address at which this machine reaches a server that listens on `host`.
 * @param {string} host
 */
function localHost(host) {
  if (host === '0.0.0.0') return '127.0.0.1'
  if (host === '::') return '[::1]'
  return host.includes(':') ? `[${host}]` : host
}

/**
 * Waits until requests can be served; the process answers for itself before it answers for its database.
 * @param {string} address
 * @param {AbortSignal} stopping
 */
async function ready(address, stopping) {
  const limit = performance.now() + readyLimitMs
  let reason = 'It does not answer.'
  while (!stopping.aborted && performance.now() < limit) {
    const alive = await fetch(`${address}/healthz`).catch(() => null)
    const answer = alive?.ok ? await fetch(`${address}/readyz`).catch(() => null) : null
    if (answer?.ok) return
    reason = answer ? await answer.text() : reason
    await delay(answer ? 1_000 : 50)
  }
  if (!stopping.aborted) throw new SetupProblem(`The application does not become ready at ${address}: ${reason}`)
}
