import { createServer } from 'node:net'

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
