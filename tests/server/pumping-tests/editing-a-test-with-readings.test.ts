import { beforeAll, describe, expect, it } from 'vitest'
import type { Problem } from '#shared/contracts/problem.ts'
import { inputOf, enterTest, readTest, theisLog } from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import {
  createWell,
  makeMapping,
  makeRegion,
  makeTestInput,
  makeUnit,
  makeWellInput,
  upload,
} from '../../support/domain.ts'

const tested = useApp()
let analyst: SignedIn
let unitId: number

beforeAll(async () => {
  await makeRegion(tested)
  unitId = await makeUnit(tested)
  analyst = await tested.signIn('analyst')
})

const edit = (person: SignedIn, id: number, body: object) => person.put(`/api/pumping-tests/${id}`).send(body)
const codesOf = (body: Problem) => body.fields.map(({ code }) => code)

describe('editing a pumping test', () => {
  it('neither shows nor hides it, which is the stewards’ business', async () => {
    const { id, input, test } = await enterTest(analyst, { unitId })
    await edit(analyst, id, { ...input, visibility: 'published', rowVersion: test.rowVersion }).expect(200)
    expect((await readTest(analyst, id)).visibility).toBe('internal')
  })

  it('does not lose the readings of a well that leaves the test', async () => {
    const { id, input, test } = await enterTest(analyst, { unitId })
    const without = { ...input, observationWells: [], rowVersion: test.rowVersion }
    expect(codesOf((await edit(analyst, id, without).expect(400)).body)).toEqual(['pumping-test/well-has-readings'])
    expect((await readTest(analyst, id)).series).toHaveLength(1)
  })

  it('lets a well without readings leave', async () => {
    const { id, input, pumped, observation, test } = await enterTest(analyst, { unitId })
    await analyst.delete(`/api/reading-series/${test.series[0]!.id}?rowVersion=1`).expect(200)
    const without = { ...inputOf({ unitId }, pumped, observation), ...input, observationWells: [] }
    await edit(analyst, id, { ...without, rowVersion: test.rowVersion }).expect(200)
    expect((await readTest(analyst, id)).wells).toHaveLength(1)
  })

  it('does not move the start under readings with clock times', async () => {
    const { id, input, test } = await enterTest(analyst, { unitId })
    const time = { kind: 'clock' as const, column: 0, dateColumn: null, dateOrder: 'ymd' as const, zone: null }
    const well = test.wells.find(({ role }) => role === 'pumped')!
    const log = 'time,drawdown\n2019-03-14 09:10,1.2\n2019-03-14 09:20,1.4\n2019-03-14 09:40,1.5'
    const moved = { ...input, startLocal: '2019-03-14T09:10', rowVersion: test.rowVersion }
    await upload(analyst, id, well.id, log, makeMapping({ time })).expect(201)
    expect(codesOf((await edit(analyst, id, moved).expect(400)).body)).toEqual(['pumping-test/start-read'])
  })

  it('moves the start under readings with elapsed times', async () => {
    const { id, input, test } = await enterTest(analyst, { unitId })
    await edit(analyst, id, { ...input, startLocal: '2019-03-14T09:10', rowVersion: test.rowVersion }).expect(200)
    expect((await readTest(analyst, id)).startLocal).toBe('2019-03-14T09:10:00')
  })
})

describe('a pumping test that cannot be', () => {
  it.each(['0000', '0001', '0219-03-14', '1799-12-31'])('is refused when it starts in %s', async (startLocal) => {
    const wellId = await createWell(analyst)
    const input = makeTestInput({ wellId, units: [{ unitId, share: 1, basis: 'single-unit' }], startLocal })
    const { body } = await analyst.post('/api/pumping-tests').send(input).expect(400)
    expect((body as Problem).fields[0]!.path).toBe('startLocal')
  })

  it('is refused when a unit has no share worth the name', async () => {
    const wellId = await createWell(analyst)
    const other = await makeUnit(tested)
    const units = [
      { unitId, share: 1, basis: 'judgement' as const },
      { unitId: other, share: 1e-320, basis: 'judgement' as const },
    ]
    const { body } = await analyst.post('/api/pumping-tests').send(makeTestInput({ wellId, units })).expect(400)
    expect((body as Problem).fields[0]!.path).toBe('units.1.share')
  })
})

describe('what is sent twice with one key', () => {
  it('is one well, one test and one log', async () => {
    const well = makeWellInput()
    const sendWell = () => analyst.post('/api/wells').set('Idempotency-Key', 'well').send(well).expect(201)
    const wellId = ((await sendWell()).body as { id: number }).id
    expect((await sendWell()).body).toEqual({ id: wellId })

    const input = makeTestInput({ wellId, units: [{ unitId, share: 1, basis: 'single-unit' }] })
    const sendTest = () => analyst.post('/api/pumping-tests').set('Idempotency-Key', 'test').send(input).expect(201)
    const { id } = (await sendTest()).body as { id: number }
    expect((await sendTest()).body).toEqual({ id })

    const { wells } = await readTest(analyst, id)
    const sendLog = () => upload(analyst, id, wells[0]!.id, theisLog(), makeMapping()).set('Idempotency-Key', 'log')
    await sendLog().expect(201)
    await sendLog().expect(201)
    expect((await readTest(analyst, id)).series).toHaveLength(1)
  })
})

describe('an upload', () => {
  it('is refused before the file is kept when the test is another person’s', async () => {
    const { id, test } = await enterTest(analyst, { unitId })
    const other = await tested.signIn('analyst')
    const { body } = await upload(other, id, test.wells[0]!.id, 'not a log', makeMapping()).expect(403)
    expect((body as Problem).code).toBe('pumping-test/not-editable')
  })

  it('that is cut off is malformed, and no failure of the server', async () => {
    const { id } = await enterTest(analyst, { unitId })
    const { body } = await analyst
      .post(`/api/pumping-tests/${id}/reading-series`)
      .set('Content-Type', 'multipart/form-data; boundary=x')
      .send('--x\r\nContent-Disposition: form-data; name="file"; filename="log.csv"\r\n\r\n1,2')
      .expect(400)
    expect((body as Problem).code).toBe('request/malformed')
  })

  it('in a character set that is none is malformed too', async () => {
    const { body } = await analyst
      .post('/api/wells')
      .set('Content-Type', 'application/json; charset=none')
      .send('{}')
      .expect(400)
    expect((body as Problem).code).toBe('request/malformed')
  })
})

describe('decisions about readings', () => {
  it('are taken for thousands of readings at once, with the longest reason', async () => {
    const { id, test } = await enterTest(analyst, { unitId })
    const lines = Array.from({ length: 3_000 }, (_, i) => `${i + 1},${1 + i / 1e5}`)
    const text = ['minutes,drawdown', ...lines].join('\n')
    const answer = await upload(analyst, id, test.wells[0]!.id, text, makeMapping()).expect(201)
    const { series } = answer.body as { series: { id: number } }
    const decision = { seqs: lines.map((_, i) => i), action: 'leave-out', reason: '💧'.repeat(150) }
    await analyst.post(`/api/reading-series/${series.id}/decisions`).send(decision).expect(200)
    const rows = await analyst.get(`/api/reading-series/${series.id}/rows?only=decided&limit=1`).expect(200)
    expect((rows.body as { total: number }).total).toBe(3_000)
  })
})
