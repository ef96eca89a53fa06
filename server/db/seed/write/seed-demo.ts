import { createServices, type Services } from '../../../api/services.ts'
import type { Deps } from '../../../deps.ts'
import type { JobContext, JobHandler } from '../../../jobs/jobs.ts'
import type { Executor } from '../../client.ts'
import { pumpingTests, wells } from '../../schema/index.ts'
import { seedAccounts } from '../accounts.ts'
import { demoRecords } from '../records/index.ts'
import type { DemoRecords, DemoTest } from '../records/types.ts'
import { localStart } from '../../../api/pumping-tests/start-time.ts'
import { calculatingOnce } from './calculating-once.ts'
import { enterFullTest } from './full-test.ts'
import { writeGeography } from './geography.ts'
import { castOf } from './people.ts'
import { enterReportedTest } from './reported-test.ts'
import { writeWell } from './wells.ts'

/** The demo region is always drawn from this seed. */
export const demoSeed = 1
/** Records that are written in one transaction: each is there whole, or not at all. */
const recordsPerTransaction = 10

/** Writes a record; what is left to do once the others of its transaction are there too. */
type Write = (services: Services) => Promise<(() => Promise<void>) | undefined>
type Database = Deps['connection']['db']

/** A transaction in place of the database: what would be one of its own is a part of this one. */
function asDatabase(tx: Executor): Database {
  const transaction = (work: (own: Executor) => Promise<unknown>) => work(tx)
  return new Proxy(tx as Database, {
    get: (target, name) => (name === 'transaction' ? transaction : (Reflect.get(target, name) as unknown)),
  })
}

const servicesIn = (deps: Deps, tx: Executor) =>
  createServices({ ...deps, connection: { ...deps.connection, db: asDatabase(tx) } })

async function inBatches(deps: Deps, context: JobContext, what: string, writes: Write[]) {
  for (let start = 0; start < writes.length; start += recordsPerTransaction) {
    await context.checkCancelled()
    await context.report({ done: start, total: writes.length, message: what })
    await deps.connection.db.transaction(async (tx) => {
      const services = servicesIn(deps, tx)
      const begun: Awaited<ReturnType<Write>>[] = []
      for (const write of writes.slice(start, start + recordsPerTransaction)) begun.push(await write(services))
      for (const goOn of begun) await goOn?.()
    })
  }
  await context.report({ done: writes.length, total: writes.length, message: what })
}

const keyOf = (wellId: number, startLocal: string) => `${wellId} ${startLocal.slice(0, 16)}`

/** Tests that are there already, by well and start: what makes the seed go on where it was interrupted. */
async function knownTests(executor: Executor): Promise<Set<string>> {
  const rows = await executor.select().from(pumpingTests)
  return new Set(rows.map((row) => keyOf(row.wellId, localStart(row.startAt, row.zone, row.startPrecision))))
}

/** In an installation made after an embargo has ended, its record is published like any other. */
function withoutPastEmbargoes(records: DemoRecords, now: Date): DemoRecords {
  const ahead = (until: string | null) => (until !== null && new Date(until) > now ? until : null)
  return {
    ...records,
    wells: records.wells.map((well) => ({ ...well, embargoUntil: ahead(well.embargoUntil) })),
    tests: records.tests.map((test) => ({ ...test, embargoUntil: ahead(test.embargoUntil) })),
  }
}

/** Fills an empty region with the Isle of Veldray, through the program's own services; repeating it changes nothing. */
export function seedDemo(outside: Deps): JobHandler {
  const deps = { ...outside, workers: calculatingOnce(outside.workers) }
  const { db } = deps.connection
  return async (_payload, context) => {
    await seedAccounts(deps, db)
    const cast = await castOf(db)
    const records = withoutPastEmbargoes(demoRecords(demoSeed), deps.now())
    const unitIds = await writeGeography(createServices(deps), cast, db, records)

    const wellIds = new Map((await db.select().from(wells)).map(({ code, id }) => [code, id]))
    const missingWells = records.wells.filter(({ code }) => !wellIds.has(code))
    const writeWells = missingWells.map((well): Write => async (services) => {
      wellIds.set(well.code, await writeWell(services, cast, records, well, unitIds))
      return undefined
    })
    await inBatches(deps, context, 'wells', writeWells)

    const known = await knownTests(db)
    const isMissing = ({ wellCode, startLocal }: DemoTest) => !known.has(keyOf(wellIds.get(wellCode)!, startLocal))
    const writeTests = records.tests.filter(isMissing).map((test): Write => (services) => {
      if (test.kind === 'reported') return enterReportedTest(services, cast, test, wellIds, unitIds)
      return enterFullTest(services, deps.workers, cast, test, wellIds, unitIds)
    })
    await inBatches(deps, context, 'tests', writeTests)
  }
}
