import { randomBytes } from 'node:crypto'
import { sql } from 'drizzle-orm'
import { beforeAll, describe, expect, it, vi } from 'vitest'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { ReadingRow, SeriesCreated } from '#shared/contracts/reading-series.ts'
import { readPackedInputs, savePackedInputs } from '../../../server/api/analyses/packed-inputs.repository.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeMapping, makeRegion, saveAnalysis, upload } from '../../support/domain.ts'
import { createTest, decide, makeSite, siteInput, submit } from '../pumping-tests/support.ts'

// Long logs are written and read again several times.
vi.setConfig({ testTimeout: 120_000 })

const tested = useApp()
let analyst: SignedIn
let reviewer: SignedIn

beforeAll(async () => {
  await makeRegion(tested)
  analyst = await tested.signIn('analyst')
  reviewer = await tested.signIn('analyst', { mayReview: true })
})

async function testWithLog(log: string): Promise<{ test: PumpingTest; created: SeriesCreated }> {
  const test = await createTest(analyst, siteInput(await makeSite(tested, analyst)))
  const well = test.wells.find(({ role }) => role === 'observation')!
  const answer = await upload(analyst, test.id, well.id, log, makeMapping()).expect(201)
  return { test, created: answer.body as SeriesCreated }
}

const db = () => tested.deps.connection.db

describe('On a database that takes statements of 16 MB', () => {
  it('which is what the database of this test takes', async () => {
    const [rows] = await db().execute(sql`select @@max_allowed_packet as bytes`)
    expect(rows).toMatchObject([{ bytes: 16 * 1024 * 1024 }])
  })

  it('rows are kept as long as they may be', async () => {
    const remark = '💧'.repeat(500)
    const rows = Array.from({ length: 2_500 }, (_, i) => `${i + 1},0.1,${remark}`)
    const { created } = await testWithLog(['minutes,drawdown,remark', ...rows].join('\n'))
    expect(created.series.takenCount).toBe(2_500)
    const last = await analyst.get(`/api/reading-series/${created.series.id}/rows?offset=2500&limit=1`).expect(200)
    // A line is kept up to 1,000 UTF-16 units, here with 495 whole characters of two; the file keeps all of it.
    expect((last.body as { items: ReadingRow[] }).items[0]!.raw).toBe(`2500,0.1,${'💧'.repeat(495)}`)
  })

  it('a snapshot longer than a statement is kept in parts, and a shorter one leaves none of them', async () => {
    const analysisId = 4_000_000_000
    const long = randomBytes(20_000_000)
    await savePackedInputs(db(), analysisId, long)
    expect(long.equals(await readPackedInputs(db(), analysisId))).toBe(true)
    const short = randomBytes(10)
    await savePackedInputs(db(), analysisId, short)
    expect(short.equals(await readPackedInputs(db(), analysisId))).toBe(true)
  })

  it('a log of forty thousand readings is uploaded, analysed, submitted and accepted', async () => {
    const readings = 40_000
    const noise = (i: number) => ((i * 7_919) % 101) / 1e5
    const drawdown = (s: number) => 0.19 * (Math.log10((2.25 * 0.005 * s) / (90 * 90 * 2e-4)) + 0.01)
    const rows = Array.from({ length: readings }, (_, i) => {
      const seconds = 3_600 + 15 * i
      return `${(seconds / 60).toFixed(4)},${(drawdown(seconds) + noise(i)).toFixed(5)}`
    })
    const { test, created } = await testWithLog(['minutes,drawdown', ...rows].join('\n'))
    expect(created.series.takenCount).toBe(readings)
    const run = vi.spyOn(tested.deps.workers, 'run')
    const draft = (await saveAnalysis(analyst, test.id, 'cooper-jacob')).body as Analysis
    const shown = (await analyst.get(`/api/analyses/${draft.id}`).expect(200)).body as Analysis
    expect(shown.adoption).toEqual(draft.adoption)
    // What accepting it would mean is taken from its long snapshot once, on a thread.
    expect(shown.adoption).toMatchObject({ evidence: expect.any(String), log10ErrorT: expect.any(Number) })
    expect(run.mock.calls.filter(([task]) => task === 'digest-analysis')).toHaveLength(1)
    run.mockRestore()
    const submitted = (await submit(analyst, draft).expect(200)).body as Analysis
    const accepted = (await decide(reviewer, submitted, 'accepted').expect(200)).body as Analysis
    expect(accepted.state).toBe('accepted')
    // 2.3 Q / (4 π Δs), with 12 L/s and 0.19 m a decade.
    expect(accepted.result.T!.value / ((Math.LN10 * 0.012) / (4 * Math.PI * 0.19))).toBeCloseTo(1, 2)
    expect((await readPackedInputs(db(), draft.id)).length).toBeLessThan(500_000)
  })
})
