import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs'
import { once } from 'node:events'
import { setTimeout as delay } from 'node:timers/promises'
import { inRoot, root } from './places.mjs'
import { endGroup, ended, startChild } from './processes.mjs'
import { seconds } from './steps.mjs'

/**
 * @typedef {import('./test-checks.mjs').Check} Check
 * @typedef {{ passed: number, failed: number, complaints: string[] }} Outcome
 */

/** What configures an installation must not reach its tests: they bring their own database and settings. */
const notForTests =
  /^(PORT|HOST|PUBLIC_URL|DATABASE_|DATA_DIR|DEMO|TRUST_PROXY|SMTP_URL|MAIL_FROM|S3_|BASEMAP_|WORKER_THREADS|LOG_LEVEL|NODE_ENV|VITE_PORT|API_ORIGIN)/

/** @param {NodeJS.ProcessEnv} env */
export const testEnvironment = (env) =>
  Object.fromEntries(Object.entries(env).filter(([key]) => !notForTests.test(key)))

/**
 * Runs checks, some at a time, and prints each when it has ended: a line, and all it said when it failed.
 * @param {Check[]} checks
 * @param {{ atOnce: number, stopping: AbortSignal, say: (line: string) => void }} options
 * @returns {Promise<Outcome[]>}
 */
export async function runChecks(checks, { atOnce, stopping, say }) {
  const waiting = [...checks]
  /** @type {Outcome[]} */
  const outcomes = []
  const work = async () => {
    for (let check = waiting.shift(); check && !stopping.aborted; check = waiting.shift()) {
      outcomes.push(await runCheck(check, stopping, say))
    }
  }
  await Promise.all(Array.from({ length: atOnce }, work))
  return outcomes
}

/**
 * @param {Check} check
 * @param {AbortSignal} stopping
 * @param {(line: string) => void} say
 * @returns {Promise<Outcome>}
 */
async function runCheck(check, stopping, say) {
  const begun = performance.now()
  const counts = inRoot(`.cache/counts-${process.pid}-${check.title.replaceAll(' ', '-')}.json`)
  mkdirSync(inRoot('.cache'), { recursive: true })
  const { status, output } = await outputOf(check, { ...testEnvironment(process.env), TEST_COUNTS: counts }, stopping)
  const outcome = outcomeOf(status, check.counts ? readCounts(counts) : { passed: 1, failed: 0, complaints: [] })
  const count = check.counts ? ` (${outcome.passed} passed, ${outcome.failed} failed)` : ''
  const word = outcome.failed === 0 ? 'passed' : 'FAILED'
  if (outcome.failed > 0) say(`\n${output.trim()}\n${outcome.complaints.map((line) => `  ${line}`).join('\n')}`)
  say(`${check.title}: ${word}${count} in ${seconds(performance.now() - begun)}`)
  return outcome
}

/**
 * @param {Check} check
 * @param {NodeJS.ProcessEnv} env
 * @param {AbortSignal} stopping
 */
async function outputOf({ args }, env, stopping) {
  const child = startChild(process.execPath, args, { cwd: root, env, stdio: ['ignore', 'pipe', 'pipe'] })
  const stop = () => void endGroup(child, 15_000)
  stopping.addEventListener('abort', stop, { once: true })
  let output = ''
  for (const stream of [child.stdout, child.stderr]) stream?.setEncoding('utf8').on('data', (text) => (output += text))
  const closed = once(child, 'close')
  const status = await ended(child)
  // What a check left running may hold its output open.
  await Promise.race([closed, delay(2_000, undefined, { ref: false })])
  stopping.removeEventListener('abort', stop)
  return { status, output }
}

/**
 * A check that ended badly has failed, even when every test that it counted passed.
 * @param {number | NodeJS.Signals | null} status
 * @param {Outcome} counted
 * @returns {Outcome}
 */
export function outcomeOf(status, { passed, failed, complaints }) {
  if (status === 0 || failed > 0) return { passed, failed, complaints }
  const single = passed === 1 && complaints.length === 0
  return { passed: single ? 0 : passed, failed: 1, complaints: [...complaints, `It ended with ${status}.`] }
}

/**
 * @param {string} file
 * @returns {Outcome}
 */
function readCounts(file) {
  if (!existsSync(file)) return { passed: 0, failed: 1, complaints: ['It ended before its tests were counted.'] }
  const counts = JSON.parse(readFileSync(file, 'utf8'))
  rmSync(file)
  if (counts.passed + counts.failed > 0) return counts
  return { passed: 0, failed: 1, complaints: ['It found no tests.'] }
}
