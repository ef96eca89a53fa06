import { spawn } from 'node:child_process'
import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { setTimeout as delay } from 'node:timers/promises'
import { CommandFailed } from './problem.mjs'

/** @typedef {import('node:child_process').ChildProcess} ChildProcess */

const setpriv = ['/usr/bin/setpriv', '/bin/setpriv'].find((path) => existsSync(path))

/**
 * Starts a long-running child. It gets its own process group, so that Ctrl-C in the terminal reaches the parent
 * alone and the parent decides the order of stopping; the kernel ends it should the parent be killed outright.
 * @param {string} command
 * @param {string[]} args
 * @param {import('node:child_process').SpawnOptions} options
 * @returns {ChildProcess}
 */
export function startChild(command, args, options = {}) {
  const own = { ...options, detached: true }
  return setpriv ? spawn(setpriv, ['--pdeathsig', 'TERM', '--', command, ...args], own) : spawn(command, args, own)
}

/**
 * @typedef {object} RunOptions
 * @property {NodeJS.ProcessEnv} [env]
 * @property {string} [cwd]
 * @property {string} [input] Given on standard input.
 * @property {(text: string) => void} [onOutput] Sees the output as it comes.
 * @property {AbortSignal} [signal]
 */

/**
 * Runs a command to its end.
 * @param {string} command
 * @param {string[]} args
 * @param {RunOptions} options
 * @returns {Promise<string>} what it printed on standard output
 * @throws {CommandFailed}
 */
export function run(command, args, options = {}) {
  const child = spawn(command, args, {
    cwd: options.cwd,
    env: options.env ?? process.env,
    signal: options.signal,
    stdio: ['pipe', 'pipe', 'pipe'],
  })
  child.stdin.on('error', () => {}) // a command that ends early closes its input; its status says why
  child.stdin.end(options.input ?? '')
  let stdout = ''
  let all = ''
  const take = (/** @type {string} */ text, /** @type {boolean} */ isOut) => {
    all += text
    if (isOut) stdout += text
    options.onOutput?.(text)
  }
  child.stdout.setEncoding('utf8').on('data', (text) => take(text, true))
  child.stderr.setEncoding('utf8').on('data', (text) => take(text, false))
  return new Promise((resolve, reject) => {
    child.on('error', reject)
    child.on('close', (code, signal) =>
      code === 0 ? resolve(stdout) : reject(new CommandFailed([command, ...args].join(' '), code ?? signal, all)),
    )
  })
}

/**
 * The end of a child, whether it comes or has come.
 * @param {ChildProcess} child
 * @returns {Promise<number | NodeJS.Signals | null>}
 */
export function ended(child) {
  if (child.exitCode !== null || child.signalCode !== null) return Promise.resolve(child.exitCode ?? child.signalCode)
  return new Promise((resolve, reject) => {
    child.once('exit', (code, signal) => resolve(code ?? signal))
    child.once('error', reject)
  })
}

/**
 * Ends a child and whatever it started itself.
 * @param {ChildProcess} child made by startChild
 * @param {number} graceMs
 */
export async function endGroup(child, graceMs) {
  if (child.pid === undefined || child.exitCode !== null || child.signalCode !== null) return
  const group = -child.pid
  const over = ended(child)
  signalIfThere(group, 'SIGTERM')
  const late = setTimeout(() => signalIfThere(group, 'SIGKILL'), graceMs)
  await over
  clearTimeout(late)
}

/** @param {number} pid */
export function isAlive(pid) {
  try {
    process.kill(pid, 0)
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'EPERM') return false
  }
  return !/^State:\s+Z/m.test(readOrEmpty(`/proc/${pid}/status`)) // a zombie has ended; only its parent is late
}

/** @param {string} path */
const readOrEmpty = (path) => {
  try {
    return readFileSync(path, 'utf8')
  } catch {
    return ''
  }
}

/**
 * Running processes that were started with exactly this argument.
 * @param {string} argument
 * @returns {number[]} their pids
 */
export function processesWith(argument) {
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name) && Number(name) !== process.pid)
    .filter((name) => readOrEmpty(`/proc/${name}/cmdline`).split('\0').includes(argument))
    .map(Number)
}

/**
 * Asks a process to end, and ends it when it has not within the grace time.
 * @param {number} pid
 * @param {number} graceMs
 */
export async function endProcess(pid, graceMs) {
  if (!signalIfThere(pid, 'SIGTERM')) return
  const limit = performance.now() + graceMs
  while (isAlive(pid) && performance.now() < limit) await delay(20)
  if (!isAlive(pid)) return
  signalIfThere(pid, 'SIGKILL')
  while (isAlive(pid)) await delay(20)
}

/**
 * @param {number} pid or minus the number of a group
 * @param {NodeJS.Signals} signal
 * @returns {boolean} whether there was somebody to tell
 */
function signalIfThere(pid, signal) {
  try {
    return process.kill(pid, signal)
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code === 'ESRCH') return false
    throw error
  }
}
