import { explain } from './problem.mjs'

/**
 * @typedef {object} Life
 * @property {AbortSignal} stopping Aborts when the process is told to end.
 * @property {(close: () => Promise<void> | void) => void} onClose Closers run at the end, the last one added first.
 */

/**
 * Runs a command to its end or to a signal, then closes what it opened. Exits 1 after an error, which it explains.
 * @param {(life: Life) => Promise<number | void>} main may give the exit status
 * @param {{ interrupted?: number }} [options] the exit status after a signal: 0 for what runs until it is told to end
 */
export async function runCommand(main, { interrupted = 0 } = {}) {
  const controller = new AbortController()
  /** @type {(() => Promise<void> | void)[]} */
  const closers = []
  for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
    process.on(signal, () => controller.abort(new Error(signal)))
  }
  let status = 0
  /** @param {unknown} error */
  const failed = (error) => {
    if (controller.signal.aborted) return // a signal stopped it half-way: that is no error
    status = 1
    process.stderr.write(`\n${explain(error)}\n`)
  }
  await main({ stopping: controller.signal, onClose: (close) => closers.push(close) }).then((code) => {
    status = code ?? 0
  }, failed)
  if (controller.signal.aborted) status = interrupted
  controller.abort()
  for (const close of closers.reverse()) await close()
  process.exit(status)
}

/**
 * @param {AbortSignal} signal
 * @returns {Promise<void>}
 */
export const aborted = (signal) =>
  new Promise((resolve) =>
    signal.aborted ? resolve() : signal.addEventListener('abort', () => resolve(), { once: true }),
  )
