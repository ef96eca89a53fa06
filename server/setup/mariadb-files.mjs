import { randomBytes } from 'node:crypto'
import { existsSync, mkdirSync, mkdtempSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'

/**
 * What a database folder keeps beside MariaDB's own files.
 * @typedef {object} Access
 * @property {string} user The application's user; root enters by the socket only.
 * @property {string} password
 * @property {string} database
 * @property {number} [port] The port of the last start, asked for again at the next one.
 * @property {string} [socket]
 * @property {boolean} [throwaway] Made for tests: fast rather than safe, at every start.
 * @property {string} [serverVersion] The version that wrote the system tables, such as 10.11.
 */

/** The longest socket path that the system takes is 107 bytes. */
const longestSocketPath = 100

/** @param {string} folder */
export const filesOf = (folder) => ({
  data: join(folder, 'data'),
  access: join(folder, 'access.json'),
  log: join(folder, 'mariadb.log'),
  socket: join(folder, 'mariadb.sock'),
})

/**
 * @param {string} folder
 * @returns {Access | undefined}
 */
export function readAccess(folder) {
  const { access } = filesOf(folder)
  return existsSync(access) ? JSON.parse(readFileSync(access, 'utf8')) : undefined
}

/** @returns {Access} */
export const newAccess = () => ({ user: 'basinbook', password: randomBytes(24).toString('hex'), database: 'basinbook' })

/**
 * Written beside and renamed, so that a full disk or a crash never leaves half a file.
 * @param {string} folder
 * @param {Access} access
 */
export function writeAccess(folder, access) {
  const { access: path } = filesOf(folder)
  writeFileSync(`${path}.new`, `${JSON.stringify(access, null, 2)}\n`, { mode: 0o600 })
  renameSync(`${path}.new`, path)
}

/**
 * A socket path that is short enough: in the folder itself, or else in a private temporary folder.
 * @param {string} folder
 * @returns {{ path: string, remove: () => void }}
 */
export function socketFor(folder) {
  const { socket } = filesOf(folder)
  if (Buffer.byteLength(socket) <= longestSocketPath)
    return { path: socket, remove: () => rmSync(socket, { force: true }) }
  const short = mkdtempSync(join(tmpdir(), 'basinbook-'))
  return { path: join(short, 'db.sock'), remove: () => rmSync(short, { recursive: true, force: true }) }
}

/** @param {string} folder */
export function makeFolder(folder) {
  mkdirSync(folder, { recursive: true, mode: 0o700 })
}

/**
 * Keeps one earlier log, so that a log never grows for years.
 * @param {string} folder
 */
export function turnLog(folder) {
  const { log } = filesOf(folder)
  if (existsSync(log) && statSync(log).size > 5_000_000) renameSync(log, `${log}.1`)
}

/** @param {string} folder */
export function logTail(folder) {
  const { log } = filesOf(folder)
  return existsSync(log) ? readFileSync(log, 'utf8').trim().split('\n').slice(-15).join('\n') : ''
}
