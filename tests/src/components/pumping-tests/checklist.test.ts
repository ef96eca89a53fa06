import { describe, expect, it } from 'vitest'
import { emptyChecklist } from '#shared/contracts/test-checklist.ts'
import { unitSystemById } from '#shared/quantities/systems.ts'
import TestConditions from '../../../../src/components/pumping-tests/TestConditions.vue'
import { checklistFormOf, checklistOf, checklistText } from '../../../../src/components/pumping-tests/checklist-form.ts'
import { mountWith } from '../../support/mount.ts'

const metric = unitSystemById('metric')

describe('conditions of a test as they are typed', () => {
  it('are not sent where nothing was recorded', () => {
    expect(checklistOf(checklistFormOf(null))).toBeNull()
    expect(checklistText(emptyChecklist(), metric)).toBe('–')
  })

  it('keep a time or distance only with the answer it belongs to', () => {
    const form = { ...emptyChecklist(), trendWatchedS: 3600, disposal: 'drain' as const, disposalDistanceM: 80 }
    expect(checklistOf(form)).toMatchObject({ trendWatchedS: null, disposal: 'drain', disposalDistanceM: 80 })
    expect(checklistText(form, metric)).toBe('Water let out: to a drain or sewer, 80 m from the pumped well')
  })
})

describe('the conditions on the page of a test', () => {
  it('stand with their notes, and name what nobody wrote down', async () => {
    const checklist = { ...emptyChecklist(), rain: 'during' as const }
    const test = { kind: 'constant-rate', checklist, conditions: 'A <b>storm</b> at noon.' }
    const page = await mountWith(TestConditions, { props: { test } })
    expect(page.text()).toContain('During the test')
    expect(page.text()).toContain('Not recorded')
    expect(page.text()).toContain('A <b>storm</b> at noon.')
  })
})
