import { afterAll, describe, expect, it } from 'vitest'
import { readLogOnThread } from '../../../server/api/reading-series/read-log.ts'
import { createWorkers } from '../../../server/jobs/piscina-workers.ts'
import { makeMapping } from '../../support/domain.ts'

const small = createWorkers(1, 48)
afterAll(() => small.close())

const logOf = (readings: number) => {
  const rows = Array.from({ length: readings }, (_, i) => `${i + 1},${(0.1 + i * 1e-6).toFixed(6)}`)
  const bytes = new TextEncoder().encode(['minutes,drawdown', ...rows].join('\n'))
  return { bytes, mapping: makeMapping(), context: { start: { instant: '2024-03-01T08:00:00.000Z', zone: 'UTC' } } }
}

describe('a log read on a worker thread', () => {
  it('is refused with a remedy when it wants too much memory, and the next one is read', async () => {
    const attempt = readLogOnThread(small, logOf(290_000))
    await expect(attempt).rejects.toMatchObject({ code: 'readings/too-much-memory', status: 422 })
    await expect(attempt).rejects.toThrow(/columns of time and value/)
    expect((await readLogOnThread(small, logOf(50))).summary.taken).toBe(50)
  })

  it('is refused with the sentence of the reader when it holds no numbers', async () => {
    const words = { ...logOf(0), bytes: new TextEncoder().encode('minutes,drawdown\na,b\n') }
    await expect(readLogOnThread(small, words)).rejects.toMatchObject({ code: 'readings/refused', status: 400 })
  })
})
