/** A failure that its reader can act on: one paragraph that says what is wrong and what to do about it. */
export class SetupProblem extends Error {}

/** A command that ended badly; the message carries the end of what it printed. */
export class CommandFailed extends Error {
  /**
   * @param {string} command
   * @param {number | NodeJS.Signals | null} status
   * @param {string} output
   */
  constructor(command, status, output) {
    super(`${command} ended with ${status}:\n${output.trim().split('\n').slice(-25).join('\n')}`)
    this.status = status
    this.output = output
  }
}

/** @type {Record<string, string>} */
const remedies = {
  EADDRINUSE: 'The port is in use by another program. Stop that program, or choose another port: PORT=8090 npm start',
  ENOSPC:
    'The disk is full. Free some space (at least 500 MB where the data folder and this folder are), then try again.',
  EDQUOT: 'Your disk quota is used up. Free some space, then try again.',
  EACCES:
    'A file or folder may not be read or written by this user. Give it to the user who runs the command (chown), or choose another data folder: DATA_DIR=/some/folder npm start',
  EPERM:
    'The system does not allow this to the user who runs the command. Run it as the user who owns the data folder, or choose another data folder: DATA_DIR=/some/folder npm start',
  EROFS: 'The disk is read-only here. Choose a data folder that can be written: DATA_DIR=/some/folder npm start',
  EMFILE: 'The limit of open files is reached. Raise it (ulimit -n 4096), then try again.',
}

/** What the tools say in their output when one of the above happened to them. */
/** @type {[RegExp, string][]} */
const signs = [
  [/ENOSPC|No space left on device|Disk is full|errno: 28\b/i, 'ENOSPC'],
  [/EADDRINUSE|Address already in use/i, 'EADDRINUSE'],
  [/EACCES|Permission denied/i, 'EACCES'],
]

/** @param {unknown} error */
const codeOf = (error) => {
  const code = /** @type {{ code?: unknown }} */ (error)?.code
  if (typeof code === 'string' && code in remedies) return code
  const text = error instanceof Error ? error.message : String(error)
  return signs.find(([sign]) => sign.test(text))?.[1]
}

/**
 * The paragraph to print for an error; unknown errors keep their stack, because nobody foresaw them.
 * @param {unknown} error
 * @returns {string}
 */
export function explain(error) {
  if (error instanceof SetupProblem) return error.message
  const code = codeOf(error)
  const text = error instanceof Error ? error.message : String(error)
  if (code) return `${remedies[code]}\n(${text})`
  if (error instanceof CommandFailed) return text
  return error instanceof Error ? (error.stack ?? text) : text
}
