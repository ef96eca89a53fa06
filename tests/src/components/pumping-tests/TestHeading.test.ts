import { describe, expect, it } from 'vitest'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import TestHeading from '../../../../src/components/pumping-tests/TestHeading.vue'
import { fakeServer } from '../../support/fake-server.ts'
import { mountWith, settle } from '../../support/mount.ts'
import { makeSession } from '../../support/session.ts'

const makeTest = (overrides: Partial<PumpingTest> = {}): PumpingTest => ({
  id: 4,
  kind: 'constant-rate',
  wellId: 9,
  wellCode: 'V-0009',
  startAt: '2019-03-14T10:00:00.000Z',
  startLocal: '2019-03-14T09:00:00',
  startPrecision: 'instant',
  zone: 'Etc/GMT+1',
  aquifer: 'confined',
  intervalBasis: 'unknown',
  intervalTopM: null,
  intervalBottomM: null,
  units: [],
  thicknessM: null,
  thicknessBasis: 'unknown',
  thicknessError: 0.1,
  rateError: 0.05,
  rateSteps: [],
  wells: [],
  series: [],
  details: null,
  checklist: null,
  conditions: null,
  source: null,
  visibility: 'internal',
  embargoUntil: null,
  createdBy: null,
  rowVersion: 3,
  mayEdit: false,
  ...overrides,
})

const mounted = (test: Partial<PumpingTest>, role: 'analyst' | 'steward') =>
  mountWith(TestHeading, { props: { test: makeTest(test) }, session: makeSession({ role }) })

const button = (text: string) =>
  [...document.querySelectorAll('button')].find((each) => each.textContent?.trim() === text)

describe('the heading of a test', () => {
  it('says who sees it, unless everybody does', async () => {
    expect((await mounted({}, 'analyst')).text()).toContain('internal')
    expect(
      (await mounted({ visibility: 'published', embargoUntil: '2031-05-01T00:00:00Z' }, 'analyst')).text(),
    ).toContain('embargoed until 1 May 2031')
    expect((await mounted({ visibility: 'published' }, 'analyst')).text()).not.toMatch(/internal|published|embargo/)
  })

  it('lets stewards publish the test, and nobody else', async () => {
    const server = fakeServer({
      'PUT /api/pumping-tests/4/visibility': () => ({
        body: { visibility: 'published', embargoUntil: null, rowVersion: 4 },
      }),
    })
    await mounted({}, 'analyst')
    expect(button('Visibility')).toBeUndefined()

    await mounted({}, 'steward')
    button('Visibility')!.click()
    await settle()
    const choice = document.querySelector<HTMLInputElement>('input[type="radio"][value="published"]')!
    choice.checked = true
    choice.dispatchEvent(new Event('input'))
    choice.dispatchEvent(new Event('change'))
    await settle()
    document.querySelector('.v-overlay--active form')!.dispatchEvent(new Event('submit', { cancelable: true }))
    await settle()
    expect(server.asked.filter(({ method }) => method === 'PUT').map(({ body }) => body)).toEqual([
      { rowVersion: 3, visibility: 'published', embargoUntil: null },
    ])
  })
})
