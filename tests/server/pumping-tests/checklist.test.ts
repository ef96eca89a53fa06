import { beforeAll, describe, expect, it } from 'vitest'
import type { PumpingTest, PumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion } from '../../support/domain.ts'
import { createTest, fieldsOf, makeSite, siteInput, type Site } from './support.ts'

const tested = useApp()
let analyst: SignedIn
let site: Site

beforeAll(async () => {
  await makeRegion(tested)
  analyst = await tested.signIn('analyst')
  site = await makeSite(tested, analyst)
})

const answers = {
  version: 1,
  staticTrend: 'steady',
  trendWatchedS: 86_400,
  dischargeMeasured: 'meter',
  disposal: 'stream',
  disposalDistanceM: 300,
  nearbyPumping: 'none',
  rain: 'during',
  barometer: 'watched',
  tide: 'no-effect',
} as const

const change = (id: number, overrides: Partial<PumpingTestInput> & { rowVersion: number }) =>
  analyst.put(`/api/pumping-tests/${id}`).send({ ...siteInput(site), ...overrides })

describe('The conditions of a test', () => {
  it('are kept with it as they were answered', async () => {
    const test = await createTest(analyst, siteInput(site, { checklist: answers }))
    expect(test.checklist).toEqual(answers)
  })

  it('may be left out, in whole or in part', async () => {
    expect((await createTest(analyst, siteInput(site))).checklist).toBeNull()
    const partly = { version: 1, rain: 'none' } as unknown as PumpingTestInput['checklist']
    const { checklist } = await createTest(analyst, siteInput(site, { checklist: partly! }))
    expect(checklist).toMatchObject({ rain: 'none', disposal: 'not-recorded', disposalDistanceM: null })
  })

  it('can be changed and taken out again', async () => {
    const test = await createTest(analyst, siteInput(site))
    const told = (await change(test.id, { checklist: answers, rowVersion: test.rowVersion }).expect(200))
      .body as PumpingTest
    expect(told.checklist).toEqual(answers)
    const emptied = (await change(test.id, { checklist: null, rowVersion: told.rowVersion }).expect(200))
      .body as PumpingTest
    expect(emptied.checklist).toBeNull()
  })

  it('are refused under the question that is wrong', async () => {
    const wrong = { ...answers, disposal: 'elsewhere', disposalDistanceM: -4 } as unknown
    const input = { ...siteInput(site), checklist: wrong }
    const { body } = await analyst.post('/api/pumping-tests').send(input).expect(400)
    expect(fieldsOf(body)).toEqual({
      'checklist.disposal': 'field/choice',
      'checklist.disposalDistanceM': 'field/too-small',
    })
  })
})
