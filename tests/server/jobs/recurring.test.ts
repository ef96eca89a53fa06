import { setTimeout as pause } from 'node:timers/promises'
import { pino } from 'pino'
import { expect, it } from 'vitest'
import { connect } from '../../../server/db/client.ts'
import { jobs } from '../../../server/db/schema/index.ts'
import { createQueue } from '../../../server/jobs/queue.ts'
import { startRecurring } from '../../../server/jobs/recurring.ts'
import { useDatabase } from '../../support/database.ts'

const database = useDatabase()

it('adds recurring work once a period, however many processes look', async () => {
  const { db, close } = connect(database.url, 8)
  const log = pino({ level: 'silent' })
  const queue = createQueue({ db, log, now: () => new Date() })
  const work = [{ kind: 'clean-up', everyMs: 3_600_000 }]
  const stops = Array.from({ length: 5 }, () => startRecurring(db, queue, log, () => new Date(), work))
  for (let i = 0; i < 100 && (await db.$count(jobs)) === 0; i += 1) await pause(20)
  await pause(300)
  for (const stop of stops) stop()
  expect(await db.$count(jobs)).toBe(1)
  await close()
})
