import { spawn, type ChildProcess } from 'node:child_process'
import { setTimeout as delay } from 'node:timers/promises'
import { inRoot, root } from '../../server/setup/places.mjs'
import { ended } from '../../server/setup/processes.mjs'
import { testEnvironment } from '../../server/setup/test-run.mjs'

export interface Command {
  child: ChildProcess
  /** Everything printed so far. */
  output(): string
  ended: Promise<number | NodeJS.Signals | null>
}

/** Starts one of the program's commands, such as `start`, with nothing of the tests' own environment that configures it. */
export function startCommand(name: string, args: string[] = [], env: NodeJS.ProcessEnv = {}): Command {
  const child = spawn(process.execPath, [inRoot(`server/setup/${name}.mjs`), ...args], {
    cwd: root,
    env: { ...testEnvironment(process.env), ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  let output = ''
  for (const stream of [child.stdout, child.stderr]) stream.setEncoding('utf8').on('data', (text) => (output += text))
  return { child, output: () => output, ended: ended(child) }
}

export async function runCommand(name: string, args: string[] = [], env: NodeJS.ProcessEnv = {}) {
  const command = startCommand(name, args, env)
  const status = await command.ended
  await delay(20) // the last words come after the end
  return { status, output: command.output() }
}

/**
 * Waits until a question is answered with something.
 * @throws when it is not within the limit
 */
export async function eventually<T>(ask: () => Promise<T | null | false | undefined>, limitMs = 30_000): Promise<T> {
  const limit = performance.now() + limitMs
  for (;;) {
    const answer = await ask()
    if (answer) return answer
    if (performance.now() > limit) throw new Error(`Nothing came within ${limitMs / 1000} s of: ${ask.toString()}`)
    await delay(50)
  }
}
