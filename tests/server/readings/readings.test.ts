import { beforeAll, describe, expect, it } from 'vitest'
import { MAX_READINGS_PER_SERIES } from '#shared/readings/limits.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import type { ReadingRow, SeriesCreated } from '#shared/contracts/reading-series.ts'
import type { WorkbenchInputs } from '#shared/contracts/analyses.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeMapping, makeRegion, upload } from '../../support/domain.ts'
import { createTest, makeSite, siteInput, type Site } from '../pumping-tests/support.ts'

const tested = useApp()
let analyst: SignedIn
let other: SignedIn
let site: Site
let test: PumpingTest
let wellId: number

beforeAll(async () => {
  await makeRegion(tested)
  analyst = await tested.signIn('analyst')
  other = await tested.signIn('analyst')
  site = await makeSite(tested, analyst)
  test = await createTest(analyst, siteInput(site))
  wellId = test.wells.find(({ role }) => role === 'observation')!.id
})

const send = (log: string | Buffer, mapping = makeMapping()) => upload(analyst, test.id, wellId, log, mapping)
const problemOf = async (log: string | Buffer) => (await send(log)).body as Problem
const rowsOf = async (id: number, only = 'all') =>
  (await analyst.get(`/api/reading-series/${id}/rows`).query({ only, limit: 500 }).expect(200)).body as {
    items: ReadingRow[]
    total: number
  }
const log = (...rows: string[]) => ['time,drawdown', ...rows].join('\n')

describe('A file that holds no readings is refused with the reason', () => {
  it('refuses an empty file', async () => {
    expect(await problemOf(Buffer.alloc(0))).toMatchObject({ status: 400, code: 'readings/refused' })
    expect((await problemOf(Buffer.alloc(0))).detail).toContain('The file is empty')
  })

  it('refuses a picture renamed to .csv by its content', async () => {
    const png = Buffer.concat([Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]), Buffer.alloc(200, 7)])
    expect((await problemOf(png)).detail).toContain('This is a picture, not a text file')
  })

  it('refuses a column without numbers, and times that are all equal', async () => {
    expect((await problemOf(log('1,high', '2,low', '3,lower'))).detail).toContain('holds no numbers')
    expect((await problemOf(log('5,0.1', '5,0.2', '5,0.3'))).detail).toContain('All 3 readings have the same time')
  })

  it('refuses a million rows and says how many a series may have', async () => {
    const million = Buffer.from(`time,drawdown\n${'1,0.123\n'.repeat(1_000_000)}`)
    const { status, detail } = await problemOf(million)
    expect(status).toBe(400)
    expect(detail).toContain(String(MAX_READINGS_PER_SERIES))
  })

  it('refuses more than 40 MB while it arrives', async () => {
    const answer = await send(Buffer.alloc(41 * 1024 * 1024, 0x31))
    expect(answer.status).toBe(413)
  })

  it('refuses a request without a file, and a mapping to a unit that is no length', async () => {
    const request = JSON.stringify({ testWellId: wellId, mapping: makeMapping() })
    const bare = await analyst.post(`/api/pumping-tests/${test.id}/reading-series`).field('request', request)
    expect(bare.status).toBe(400)
    const wrong = { ...makeMapping(), value: { column: 1, quantity: 'drawdown' as const, unit: 'furlong' } }
    expect((await send(log('1,0.1'), wrong)).status).toBe(400)
  })
})

describe('A log is read row by row and nothing is dropped', () => {
  it('says of every line whether it was taken, and why not', async () => {
    const answer = await send(log('1,0.10', '2,', 'x,0.30', '', '4,-9999', '5,0.50', '5,0.51'))
    const { series } = answer.body as SeriesCreated
    const { items, total } = await rowsOf(series.id)
    expect(total).toBe(8)
    expect(items.map(({ taken }) => taken)).toEqual([false, true, false, false, false, false, true, true])
    const codes = items.map(({ issues }) => issues.map(({ code }) => code))
    expect([codes[0], codes[4]]).toEqual([['readings/preamble'], ['readings/blank-line']])
    expect(codes[2]).toContain('readings/value-missing')
    expect(codes[3]).toContain('readings/time-unreadable')
    expect(codes[5]).toContain('readings/sentinel')
    expect(codes[7]).toContain('readings/duplicate-time')
    expect(items[2]!.raw).toBe('2,')
    expect((await rowsOf(series.id, 'not-taken')).total).toBe(5)
  })

  it('gives the file back as it came', async () => {
    const text = log('1;0,1', '2;0,2 <b>wet</b>')
    const mapping = makeMapping({ delimiter: ';', decimalMark: ',' })
    const { series } = (await send(text.replace('time,', 'time;'), mapping)).body as SeriesCreated
    const file = await analyst
      .get(`/api/reading-series/${series.id}/file`)
      .buffer(true)
      .parse((res, done) => {
        const parts: Buffer[] = []
        res.on('data', (part: Buffer) => parts.push(part))
        res.on('end', () => done(null, Buffer.concat(parts)))
      })
    expect((file.body as Buffer).toString()).toBe(text.replace('time,', 'time;'))
    expect(file.headers['content-disposition']).toContain('attachment')
  })
})

describe('Readings are left out and taken back by a word with its reason', () => {
  it('keeps the reading, shows the decision, and changes what is calculated with', async () => {
    const { series } = (await send(log('1,0.1', '2,0.2', '3,9.9', '4,0.4'))).body as SeriesCreated
    const inputs = async () =>
      (await analyst.get(`/api/pumping-tests/${test.id}/inputs`).expect(200)).body as WorkbenchInputs
    const before = await inputs()
    const decision = { seqs: [3], action: 'leave-out', reason: 'cable pulled' }
    await analyst.post(`/api/reading-series/${series.id}/decisions`).send(decision).expect(200)
    const after = await inputs()
    expect(before.inputs.series[0]!.included).toEqual([true, true, true, true])
    expect(after.inputs.series[0]!.included).toEqual([true, true, false, true])
    expect(after.inputs.series[0]!.drawdown_m[2]).toBe(9.9)
    expect(after.sha256).not.toBe(before.sha256)
    const { items } = await rowsOf(series.id, 'decided')
    expect(items.map(({ seq, included, decision: word }) => [seq, included, word?.reason])).toEqual([
      [3, false, 'cable pulled'],
    ])
    await analyst
      .post(`/api/reading-series/${series.id}/decisions`)
      .send({ ...decision, action: 'take' })
      .expect(200)
    expect((await inputs()).sha256).toBe(before.sha256)
  })

  it('refuses a decision without a reason, about a row that is not there, and by somebody else', async () => {
    const { series } = (await send(log('1,0.1', '2,0.2', '3,0.3'))).body as SeriesCreated
    const decide = (person: SignedIn, body: object) =>
      person
        .post(`/api/reading-series/${series.id}/decisions`)
        .send({ seqs: [1], action: 'leave-out', reason: 'wet', ...body })
    expect((await decide(analyst, { reason: '  ' })).status).toBe(400)
    expect((await decide(analyst, { seqs: [77] })).status).toBe(404)
    expect((await decide(other, {})).status).toBe(403)
  })
})

describe('A log is deleted', () => {
  it('only by its row version and its owner, and then the older log of the well counts again', async () => {
    const own = await createTest(analyst, siteInput(site))
    const at = own.wells.find(({ role }) => role === 'observation')!.id
    const first = await upload(analyst, own.id, at, log('1,0.1', '2,0.2', '3,0.3'), makeMapping())
    const second = (await upload(analyst, own.id, at, log('1,0.5', '2,0.6', '3,0.7'), makeMapping()))
      .body as SeriesCreated
    expect(first.status).toBe(201)
    const path = `/api/reading-series/${second.series.id}`
    expect((await analyst.delete(`${path}?rowVersion=9`)).status).toBe(409)
    expect((await other.delete(`${path}?rowVersion=1`)).status).toBe(403)
    expect((await analyst.delete(`${path}?rowVersion=1`)).status).toBe(200)
    const { inputs } = (await analyst.get(`/api/pumping-tests/${own.id}/inputs`)).body as WorkbenchInputs
    expect(inputs.series[0]!.drawdown_m).toEqual([0.1, 0.2, 0.3])
  })
})
