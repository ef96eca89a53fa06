import { describe, expect, it } from 'vitest'
import { keepRunning } from '../../../server/setup/supervise.mjs'

/** A program that ends at once, each time with the next status; the last one ends when told to stop. */
function makeProgram(statuses: (number | string)[]) {
  const controller = new AbortController()
  const said: string[] = []
  let starts = 0
  const start = () => {
    const status = statuses[starts++]
    if (status === undefined) controller.abort()
    return { ended: Promise.resolve(status ?? 0) }
  }
  const run = () =>
    keepRunning('The program', start, { stopping: controller.signal, say: (line) => said.push(line), firstDelayMs: 1 })
  return { run, said, starts: () => starts }
}

describe('a program that crashes', () => {
  it('is started again, five times within a minute', async () => {
    const program = makeProgram(['SIGKILL', 1, 0, 1, 1])
    await program.run()
    expect(program.starts()).toBe(6)
    expect(program.said).toHaveLength(5)
    expect(program.said[0]).toBe('The program ended with SIGKILL. It starts again in 0.0 s.')
  })

  it('is given up after the sixth crash within a minute', async () => {
    const program = makeProgram([1, 1, 1, 1, 1, 'SIGSEGV', 1])
    await expect(program.run()).rejects.toThrow('ended 6 times within a minute, the last time with SIGSEGV')
    expect(program.starts()).toBe(6)
  })

  it('is not started again when its configuration is what it cannot use', async () => {
    const program = makeProgram([78])
    await expect(program.run()).rejects.toThrow('cannot start with this configuration')
    expect(program.starts()).toBe(1)
  })
})
