import { setTimeout as delay } from 'node:timers/promises'
import { SetupProblem } from './problem.mjs'
import { seconds } from './steps.mjs'

/** The exit status (sysexits' EX_CONFIG) of a program that another start would not help. */
const configurationStatus = 78
const mostRestarts = 5
const windowMs = 60_000

/**
 * Runs a program again when it crashes, a little later each time, until told to stop.
 * @param {string} name at the start of a sentence
 * @param {() => { ended: Promise<unknown> } | Promise<{ ended: Promise<unknown> }>} start
 * @param {{ stopping: AbortSignal, say: (line: string) => void, firstDelayMs?: number }} options
 * @throws {SetupProblem} when it crashed more than five times within a minute
 */
export async function keepRunning(name, start, { stopping, say, firstDelayMs = 250 }) {
  /** @type {number[]} */
  let crashes = []
  while (!stopping.aborted) {
    const status = await (await start()).ended
    if (stopping.aborted) return
    if (status === configurationStatus) throw new SetupProblem(`${name} cannot start with this configuration.`)
    const now = performance.now()
    crashes = [...crashes.filter((time) => now - time < windowMs), now]
    if (crashes.length > mostRestarts) {
      throw new SetupProblem(
        `${name} ended ${crashes.length} times within a minute, the last time with ${status}. Its last messages are above.`,
      )
    }
    const wait = firstDelayMs * 2 ** (crashes.length - 1)
    say(`${name} ended with ${status}. It starts again in ${seconds(wait)}.`)
    await delay(wait, undefined, { signal: stopping }).catch(() => {})
  }
}
