import { spawn, spawnSync } from 'node:child_process'
import { closeSync, ftruncateSync, mkdirSync, openSync, readFileSync, writeSync } from 'node:fs'
import { dirname } from 'node:path'
import { ended } from './processes.mjs'
import { SetupProblem } from './problem.mjs'

/**
 * Locks are the kernel's (flock): they end with the process that holds them, however it ends, so there is never a
 * stale one. The file keeps the holder's pid for messages only.
 */

/** @param {string} path */
function open(path) {
  mkdirSync(dirname(path), { recursive: true })
  return openSync(path, 'a+', 0o600)
}

/** @param {number} fd */
const taken = (fd) => {
  const { status, error } = spawnSync('flock', ['-n', '3'], { stdio: ['ignore', 'ignore', 'ignore', fd] })
  if (error) throw error
  return status === 0
}

/**
 * @param {number} fd
 * @param {string} purpose
 * @returns {() => void} gives the lock back
 */
function hold(fd, purpose) {
  ftruncateSync(fd)
  writeSync(fd, `${process.pid} ${purpose}\n`)
  return () => closeSync(fd)
}

/** @typedef {{ pid: number, purpose: string }} Holder */

/**
 * @param {string} path
 * @returns {Holder}
 */
function readHolder(path) {
  const [pid, ...purpose] = readFileSync(path, 'utf8').trim().split(' ')
  return { pid: Number(pid), purpose: purpose.join(' ') }
}

/**
 * Takes a lock that nobody may hold.
 * @param {string} path
 * @param {string} purpose what it is taken for, for those who find it taken
 * @param {(holder: Holder) => string} refusal What to say when another process has it.
 * @returns {() => void} gives it back
 * @throws {SetupProblem} naming the holder
 */
export function takeLock(path, purpose, refusal) {
  const fd = open(path)
  if (taken(fd)) return hold(fd, purpose)
  closeSync(fd)
  throw new SetupProblem(refusal(readHolder(path)))
}

/**
 * Who holds a lock now.
 * @param {string} path
 * @returns {Holder | null}
 */
export function lockHolder(path) {
  const fd = open(path)
  const free = taken(fd)
  closeSync(fd)
  return free ? null : readHolder(path)
}

/**
 * Takes a lock, waiting until its holder gives it back.
 * @param {string} path
 * @returns {Promise<() => void>} gives it back
 */
export async function waitForLock(path) {
  const fd = open(path)
  const status = await ended(spawn('flock', ['3'], { stdio: ['ignore', 'ignore', 'inherit', fd] }))
  if (status === 0) return hold(fd, 'turn')
  closeSync(fd)
  throw new SetupProblem(`The lock ${path} could not be taken.`)
}
