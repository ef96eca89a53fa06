import type { LogReading, Refusal } from '#shared/readings/model.ts'
import { readingIssueText } from '#shared/words/readings.ts'
import { AppError } from '../../errors.ts'
import type { ReadLogInput } from '../../jobs/tasks/read-log.ts'
import { isOutOfMemory, type Workers } from '../../jobs/workers.ts'

/**
 * Reads a log on a worker thread.
 * @throws AppError with the reader's own sentence when it refuses the file, and where the file takes more memory than one
 * thread may have, as one of very many columns does
 */
export async function readLogOnThread(workers: Workers, input: ReadLogInput): Promise<LogReading> {
  const reading = await workers.run<LogReading | Refusal>('read-log', input).catch((error: unknown) => {
    throw isOutOfMemory(error) ? new AppError('readings/too-much-memory') : error
  })
  if (reading.ok) return reading
  throw new AppError('readings/refused', { reason: readingIssueText(reading.code, reading.params) })
}
