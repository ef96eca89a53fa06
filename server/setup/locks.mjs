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

/**
 * @param {number} fd
 * @returns {() => void} gives the lock back
 */
function hold(fd) {
  ftruncateSync(fd)
  writeSync(fd, `${process.pid}\n`)
  return () => closeSync(fd)
}

/**
 * Takes a lock that nobody may hold.
 * @param {string} path
 * @param {(pid: string) => string} refusal What to say when another process has it.
 * @returns {() => void} gives it back
 * @throws {SetupProblem} naming the holder
 */
export function takeLock(path, refusal) {
  const fd = open(path)
  const { status, error } = spawnSync('flock', ['-n', '3'], { stdio: ['ignore', 'ignore', 'ignore', fd] })
  if (status === 0) return hold(fd)
  const pid = readFileSync(path, 'utf8').trim()
  closeSync(fd)
  if (error) throw error
  throw new SetupProblem(refusal(pid))
}

/**
 * Whether another process holds a lock now.
 * @param {string} path
 */
export function isLocked(path) {
  const fd = open(path)
  const { status } = spawnSync('flock', ['-n', '3'], { stdio: ['ignore', 'ignore', 'ignore', fd] })
  closeSync(fd)
  return status !== 0
}

/**
 * Takes a lock, waiting until its holder gives it back.
 * @param {string} path
 * @returns {Promise<() => void>} gives it back
 */
export async function waitForLock(path) {
  const fd = open(path)
  const status = await ended(spawn('flock', ['3'], { stdio: ['ignore', 'ignore', 'inherit', fd] }))
  if (status === 0) return hold(fd)
  closeSync(fd)
  throw new SetupProblem(`The lock ${path} could not be taken.`)
}
