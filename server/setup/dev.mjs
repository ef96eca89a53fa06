import { checkedPort } from './free-port.mjs'
import { aborted, runCommand } from './lifecycle.mjs'
import { demoAccounts } from './demo-accounts.mjs'
import { inRoot, root } from './places.mjs'
import { marker, prepare } from './prepare.mjs'
import { SetupProblem } from './problem.mjs'
import { endGroup, ended, startChild } from './processes.mjs'
import { makeSteps } from './steps.mjs'

/** `npm run dev`: a server that starts again when its files change, and Vite with hot reload in front of it. */
await runCommand(async (life) => {
  const steps = makeSteps()
  const { settings, config, database, env } = await prepare(steps, life)
  const apiPort = String(await checkedPort(config.port, config.host))
  const pagePort = String(await checkedPort(Number(process.env.VITE_PORT ?? 5173), '127.0.0.1'))
  const page = `http://127.0.0.1:${pagePort}`
  // Links in mails and the check of a request's origin must name the address in the browser, which is Vite's.
  const publicUrl = process.env.PUBLIC_URL ?? page
  const all = { ...env, PORT: apiPort, PUBLIC_URL: publicUrl, VITE_PORT: pagePort, NODE_ENV: 'development' }
  const server = ['--watch', '--import', 'tsx', inRoot('server/index.ts'), marker(settings.dataDir)]
  const vite = [inRoot('node_modules/vite/bin/vite.js'), '--host', '127.0.0.1', '--strictPort']
  steps.say(`\nThe pages are at ${page}. Ctrl-C ends everything.`)
  if (settings.demo) steps.say(demoAccounts())
  await Promise.race([
    aborted(life.stopping),
    database.keepRunning({ stopping: life.stopping, say: steps.say }),
    untilEnd('The server', server, all, life),
    untilEnd('Vite', vite, { ...all, API_ORIGIN: `http://127.0.0.1:${apiPort}` }, life),
  ])
})

/**
 * @param {string} name
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} env
 * @param {import('./lifecycle.mjs').Life} life
 */
async function untilEnd(name, args, env, life) {
  const child = startChild(process.execPath, args, { cwd: root, env, stdio: ['ignore', 'inherit', 'inherit'] })
  life.onClose(() => endGroup(child, 15_000))
  const status = await ended(child)
  if (!life.stopping.aborted) throw new SetupProblem(`${name} ended with ${status}. Its messages are above.`)
}
