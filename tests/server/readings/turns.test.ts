import { describe, expect, it } from 'vitest'
import { createTurns } from '../../../server/api/reading-series/turns.ts'

/** A task that goes on until it is told to end. */
function makeTask(name: string, log: string[]) {
  let end: (error?: Error) => void = () => undefined
  const ended = new Promise<string>((resolve, reject) => {
    end = (error) => (error ? reject(error) : resolve(name))
  })
  return {
    run: () => {
      log.push(name)
      return ended
    },
    end,
  }
}

/** Everything that can go on has gone on. */
const settle = () => new Promise((resolve) => setImmediate(resolve))

describe('Turns', () => {
  it('run so many tasks at a time, and the others in the order in which they came', async () => {
    const started: string[] = []
    const tasks = ['a', 'b', 'c', 'd'].map((name) => makeTask(name, started))
    const inTurn = createTurns(2)
    const results = tasks.map(({ run }) => inTurn(run))
    await settle()
    expect(started).toEqual(['a', 'b'])
    tasks[1]!.end()
    await settle()
    expect(started).toEqual(['a', 'b', 'c'])
    for (const { end } of tasks) end()
    expect(await Promise.all(results)).toEqual(['a', 'b', 'c', 'd'])
  })

  it('pass on when a task fails, and its caller is told', async () => {
    const started: string[] = []
    const [bad, good] = [makeTask('bad', started), makeTask('good', started)]
    const inTurn = createTurns(1)
    const results = Promise.allSettled([inTurn(bad.run), inTurn(good.run)])
    bad.end(new Error('broken'))
    good.end()
    expect(await results).toMatchObject([
      { status: 'rejected', reason: { message: 'broken' } },
      { status: 'fulfilled', value: 'good' },
    ])
    // All turns are free again.
    expect(await inTurn(() => Promise.resolve('later'))).toBe('later')
  })
})
