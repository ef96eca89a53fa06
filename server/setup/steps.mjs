/**
 * @typedef {object} Steps
 * @property {<T>(title: string, action: () => Promise<T> | T) => Promise<T>} step Prints what is done and how long it took.
 * @property {(line: string) => void} say
 */

/** @param {number} ms */
export const seconds = (ms) => `${(ms / 1000).toFixed(1)} s`

/**
 * A printer of steps. A step that prints nothing itself stays on one line.
 * @param {NodeJS.WritableStream} out
 * @returns {Steps}
 */
export function makeSteps(out = process.stdout) {
  /** The title of the step whose line is not finished yet. */
  let open = ''
  /** @param {string} line */
  const say = (line) => {
    if (open) out.write('\n')
    open = ''
    out.write(`${line}\n`)
  }
  /** @type {Steps['step']} */
  const step = async (title, action) => {
    const start = performance.now()
    out.write(`${title} … `)
    open = title
    const end = (/** @type {string} */ word) => {
      const text = `${word}${seconds(performance.now() - start)}`
      out.write(open === title ? `${text}\n` : `${title}: ${text}\n`)
      open = ''
    }
    try {
      const result = await action()
      end('')
      return result
    } catch (error) {
      end('failed after ')
      throw error
    }
  }
  return { step, say }
}
