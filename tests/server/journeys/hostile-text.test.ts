import request from 'supertest'
import { beforeAll, describe, expect, it } from 'vitest'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { DecidedReview, ReviewQueueItem } from '#shared/contracts/reviews.ts'
import type { SeriesCreated } from '#shared/contracts/reading-series.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { createWell, makeMapping, makeRegion, makeUnit, saveAnalysis } from '../../support/domain.ts'
import { createTest, decide, makeLog, siteInput } from '../pumping-tests/support.ts'

const tested = useApp()
let analyst: SignedIn
let reviewer: SignedIn

beforeAll(async () => {
  await makeRegion(tested)
  analyst = await tested.signIn('analyst')
  reviewer = await tested.signIn('analyst', { mayReview: true })
})

const html = '<img src=x onerror=alert(1)>'
const hostile = `${html}'); DROP TABLE wells; -- %_\\ \u202E {{1+1}}`

let entered = 0

/** A test whose every free text is hostile, up to its submission. */
async function enterHostile() {
  const code = `'${html}--${(entered += 1)}`
  const unitId = await makeUnit(tested, { name: hostile })
  const pumped = await createWell(analyst, { code, name: hostile, ownerLabel: hostile, notes: hostile })
  const observation = await createWell(analyst, { x: -21.199, code: `${code}'; --` })
  const test = await createTest(analyst, siteInput({ unitId, pumped, observation }, { conditions: hostile }))
  const testWellId = test.wells.find(({ role }) => role === 'observation')!.id
  const sent = await analyst
    .post(`/api/pumping-tests/${test.id}/reading-series`)
    .field('request', JSON.stringify({ testWellId, mapping: makeMapping() }))
    .attach('file', Buffer.from(makeLog()), { filename: `${html}'; DROP TABLE readings; --.csv` })
    .expect(201)
  const draft = (await saveAnalysis(analyst, test.id, 'cooper-jacob')).body as Analysis
  const submission = { rowVersion: draft.rowVersion, rationale: hostile, confirmed: [] }
  const submitted = await analyst.post(`/api/analyses/${draft.id}/submission`).send(submission).expect(200)
  return { code, pumped, test, series: (sent.body as SeriesCreated).series, analysis: submitted.body as Analysis }
}

describe('HTML and SQL in every free text', () => {
  it('come back as they were typed, as JSON that no browser takes for a page, and do nothing', async () => {
    const { code, pumped, test, series, analysis } = await enterHostile()
    expect(analysis.rationale).toBe(hostile)
    const read = await analyst.get(`/api/pumping-tests/${test.id}`).expect(200)
    expect(read.headers['content-type']).toContain('application/json')
    expect(read.headers['x-content-type-options']).toBe('nosniff')
    const again = read.body as PumpingTest
    expect(again.conditions).toBe(hostile)
    expect(again.wells.map(({ code }) => code)).toEqual([code, `${code}'; --`])
    expect(again.series.map(({ fileName }) => fileName)).toEqual([`${html}'; DROP TABLE readings; --.csv`])
    expect((await analyst.get(`/api/wells/${pumped}`).expect(200)).body).toMatchObject({
      name: hostile,
      notes: hostile,
    })

    const file = await analyst.get(`/api/reading-series/${series.id}/file`).buffer(true).expect(200)
    expect(file.headers['content-type']).toBe('application/octet-stream')
    expect(file.headers['content-disposition']).toMatch(/^attachment; filename=/)
    expect(file.headers['content-security-policy']).toContain("default-src 'self'")
  })

  it('stand in the queue and the comment of a review as they are', async () => {
    const { analysis } = await enterHostile()
    const queue = (await reviewer.get('/api/reviews').expect(200)).body as { items: ReviewQueueItem[] }
    expect(queue.items.find(({ id }) => id === analysis.id)!.rationale).toBe(hostile)
    await decide(reviewer, analysis, 'returned', hostile).expect(200)
    const decided = (await reviewer.get('/api/reviews/decided').expect(200)).body as { items: DecidedReview[] }
    expect(decided.items.find(({ id }) => id === analysis.id)!.comment).toBe(hostile)
  })

  it.each([`' or '1'='1`, '%', '_', '\\', `${html}`, '"; select sleep(9); --', '\u0000', '💧'.repeat(40)])(
    'in a search for %j finds only what holds it',
    async (text) => {
      await createWell(analyst, { code: `PLAIN-${Math.random()}`, name: 'An ordinary name' })
      const answer = await analyst.get('/api/wells').query({ text, limit: 200 })
      expect([200, 400]).toContain(answer.status)
      if (answer.status === 400) return
      const { items } = answer.body as { items: { code: string; name: string | null }[] }
      for (const { code, name } of items) expect(`${code} ${name}`.toLowerCase()).toContain(text.toLowerCase())
    },
  )
})

describe('a request that is none', () => {
  it.each([
    ['no JSON', '{"code": '],
    ['a list', '[]'],
    ['a number', '7'],
    ['a prototype', '{"__proto__": {"role": "administrator"}}'],
    ['lists a hundred thousand deep', '['.repeat(100_000)],
  ])('is refused with its reason where it is %s', async (_, body) => {
    const answer = await analyst.post('/api/wells').set('Content-Type', 'application/json').send(body)
    expect(answer.status).toBe(400)
    expect(answer.headers['content-type']).toContain('application/problem+json')
  })

  it.each([
    '/api/wells/%00',
    '/api/wells/%',
    '/api/wells/..%2F..%2Fetc%2Fpasswd',
    '/api/wells/1e999',
    '/api/wells?limit=-1',
  ])('is refused at %s, and no failure of the server', async (path) => {
    const { status } = await request(tested.app).get(path)
    expect(status).toBeGreaterThanOrEqual(400)
    expect(status).toBeLessThan(500)
  })
})
