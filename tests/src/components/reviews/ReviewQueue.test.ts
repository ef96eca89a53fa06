import { describe, expect, it } from 'vitest'
import type { ReviewQueueItem } from '#shared/contracts/reviews.ts'
import ReviewQueue from '../../../../src/components/reviews/ReviewQueue.vue'
import { mountWith } from '../../support/mount.ts'
import { makeSession } from '../../support/session.ts'

const estimate = (value: number) => ({ value, low: value / 2, high: value * 2, logSd: 0.1, determined: true })
const makeItem = (overrides: Partial<ReviewQueueItem> = {}): ReviewQueueItem => ({
  id: 74,
  pumpingTestId: 66,
  wellCode: 'V-0075',
  startLocal: '1996-11-01T10:00:00',
  method: 'theis',
  label: 'Observation wells together',
  rationale: 'The curve follows all readings.',
  T: estimate(1e-3),
  S: estimate(0.15),
  storageClass: 'specific-yield',
  author: 'Hydrogeologist',
  submittedAt: '2020-05-04T10:00:00.000Z',
  inputsChanged: false,
  mayReview: true,
  ...overrides,
})
const mounted = (item: Partial<ReviewQueueItem> = {}, mayReview = true) =>
  mountWith(ReviewQueue, { props: { items: [makeItem(item)] }, session: makeSession({ mayReview }) })

describe('the queue of reviews', () => {
  it('tells well, day of the test, method, numbers, author and why', async () => {
    const text = (await mounted()).text().replaceAll('\u202f', ' ')
    expect(text).toContain('Well V-0075, test of 1 Nov 1996')
    expect(text).toContain('Confined aquifer curve (Theis): Observation wells together')
    expect(text).toContain('86.4 m²/d')
    expect(text).toContain('Specific yield')
    expect(text).toContain('The curve follows all readings.')
    expect(text).toContain('Hydrogeologist')
  })

  it('leads to the analysis in its workbench, where the decision is taken', async () => {
    expect((await mounted()).get('a').attributes('href')).toBe('/pumping-tests/66?analysis=74')
  })

  it('warns of inputs that changed, and says when somebody else must decide', async () => {
    expect((await mounted({ inputsChanged: true })).text()).toContain('Inputs changed')
    expect((await mounted({ mayReview: false })).text()).toContain('You took part: somebody else decides')
    expect((await mounted({ mayReview: false }, false)).text()).not.toContain('You took part')
    expect((await mounted()).text()).not.toContain('Inputs changed')
  })

  it('shows no storage where the analysis gives none', async () => {
    expect((await mounted({ S: null, storageClass: null })).findAll('dt').map((term) => term.text())).toEqual([
      'Transmissivity',
    ])
  })
})
