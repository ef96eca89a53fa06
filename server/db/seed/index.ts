import { and, desc, eq, ne } from 'drizzle-orm'
import { parseConfig } from '../../config/config.ts'
import { createDeps } from '../../create-deps.ts'
import { registerHandlers } from '../../jobs/handlers.ts'
import { jobs } from '../schema/index.ts'
import { seedDemo } from './write/seed-demo.ts'

const kind = 'seed-demo'

/** Adds the demo region to the database of this configuration; goes on where an interrupted run ended. */
async function main() {
  const deps = await createDeps(parseConfig({ ...process.env, LOG_LEVEL: 'error' }))
  const { db } = deps.connection
  try {
    if ((await db.$count(jobs, and(eq(jobs.kind, kind), eq(jobs.state, 'done')))) > 0) return
    deps.jobs.handle(kind, seedDemo(deps))
    registerHandlers(deps)
    // An interrupted run left its job behind; this one goes on where it ended.
    await db
      .update(jobs)
      .set({ state: 'cancelled', uniqueKey: null })
      .where(and(eq(jobs.kind, kind), ne(jobs.state, 'done')))
    await deps.jobs.enqueue(db, kind, { uniqueKey: kind })
    const stop = followProgress(deps)
    await deps.jobs.drain()
    stop()
    const [job] = await db.select().from(jobs).where(eq(jobs.kind, kind)).orderBy(desc(jobs.id)).limit(1)
    if (job?.state !== 'done') throw new Error(job?.errorDetail ?? 'The demo region could not be written.')
  } finally {
    await deps.close()
  }
}

/** Prints how far the seed has come, a line a change. */
function followProgress({ connection: { db } }: Awaited<ReturnType<typeof createDeps>>) {
  let told = ''
  const look = async () => {
    const [job] = await db
      .select()
      .from(jobs)
      .where(and(eq(jobs.kind, kind), eq(jobs.state, 'running')))
    const line = job?.total ? `${job.done} of ${job.total} ${job.message}` : ''
    if (line && line !== told) process.stdout.write(`${line}\n`)
    told = line
  }
  const timer = setInterval(() => void look().catch(() => undefined), 2_000)
  return () => clearInterval(timer)
}

await main()
