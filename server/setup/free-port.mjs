import { createServer } from 'node:net'
import { SetupProblem } from './problem.mjs'

/**
 * Whether a server could listen there now.
 * @param {number} port 0 lets the system choose
 * @param {string} host
 * @returns {Promise<number>} the port
 * @throws the system's error: EADDRINUSE, EACCES, EADDRNOTAVAIL
 */
export function tryPort(port, host = '127.0.0.1') {
  const server = createServer()
  return new Promise((resolve, reject) => {
    server.once('error', reject)
    server.listen(port, host, () => {
      const address = /** @type {import('node:net').AddressInfo} */ (server.address())
      server.close(() => resolve(address.port))
    })
  })
}

/**
 * The preferred port when it is free, otherwise any free one.
 * @param {number | undefined} preferred
 */
export async function freePort(preferred) {
  return preferred ? tryPort(preferred).catch(() => tryPort(0)) : tryPort(0)
}

/** @type {Record<string, string>} */
const remedies = {
  EADDRINUSE: 'is in use by another program. Stop that program, or choose another port: PORT=8090 npm start',
  EACCES: 'may not be opened by this user: ports below 1024 belong to root. Choose another: PORT=8090 npm start',
  EADDRNOTAVAIL: 'is no address of this machine. HOST must be one of its own addresses: HOST=127.0.0.1 npm start',
  ENOTFOUND: 'cannot be found. HOST must be an address of this machine: HOST=127.0.0.1 npm start',
}

/**
 * The port to listen on: the one asked for, or any for 0.
 * @param {number} port
 * @param {string} host
 * @throws {SetupProblem} when a server could not listen there
 */
export async function checkedPort(port, host) {
  try {
    return await tryPort(port, host)
  } catch (error) {
    const remedy = remedies[/** @type {NodeJS.ErrnoException} */ (error).code ?? '']
    throw remedy ? new SetupProblem(`${host}:${port} ${remedy}`) : error
  }
}
