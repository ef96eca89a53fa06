import { describe, expect, it } from 'vitest'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import CorrectionForm from '../../../../src/components/corrections/CorrectionForm.vue'
import CorrectionItem from '../../../../src/components/corrections/CorrectionItem.vue'
import { fakeServer, refuse } from '../../support/fake-server.ts'
import { mountWith, settle } from '../../support/mount.ts'
import { makeOutside, makeRecord, makeWell } from './make.ts'

const test = { id: 1, wells: [{ wellId: 7, code: 'OB-1' }] } as PumpingTest
const item = (props: Record<string, unknown> = {}) =>
  mountWith(CorrectionItem, {
    props: { correction: makeRecord(), test, wells: [makeWell()], series: [makeOutside()], editable: true, ...props },
  })

describe('a correction on the page', () => {
  it('tells its figures in each well, what they were learned from, and what to bear in mind', async () => {
    const text = (await item()).text().replaceAll('\u202f', ' ')
    expect(text).toContain('Air pressure: Roof')
    expect(text).toContain('OB-1 efficiency 0.4 ± 0.012, lag 120 min, explains 96 % of what moved before pumping')
    expect(text).toContain('2 d before pumping, 96 readings')
    expect(text).toContain('The record before pumping lasts 2 d, less than the test with its 4 d.')
  })

  it('is switched off as it is, by its version', async () => {
    const server = fakeServer({ 'PUT /api/corrections/5': () => ({ body: makeRecord({ active: false }) }) })
    const mounted = await item()
    await mounted.get('button[aria-pressed="true"]').trigger('click')
    await settle()
    const [sent] = server.asked
    expect(sent!.body).toMatchObject({ active: false, rowVersion: 3, settings: { kind: 'barometric' }, wellIds: null })
  })

  it('says why it could not be changed', async () => {
    fakeServer({ 'PUT /api/corrections/5': () => refuse('edit/conflict') })
    const mounted = await item()
    await mounted.get('button[aria-pressed="true"]').trigger('click')
    await settle()
    expect(mounted.get('[role="alert"]').text()).not.toBe('')
  })

  it('shows no figures while it is off, and no buttons to who may not edit', async () => {
    const off = await item({ correction: makeRecord({ active: false }), editable: false })
    expect(off.text()).not.toContain('efficiency')
    expect(off.findAll('button')).toHaveLength(0)
  })
})

describe('the form of a correction', () => {
  const mounted = (series = [makeOutside()]) => mountWith(CorrectionForm, { props: { test, series, given: null } })

  it('asks for the series where there is none that could be the cause', async () => {
    const form = await mounted([])
    await form.get('select').setValue('barometric')
    expect(form.text()).toContain('This needs a series: air pressure')
    expect(form.get('button[type="submit"]').attributes('disabled')).toBeDefined()
  })

  it('sends figures to be learned in all wells, and leaves no well out by accident', async () => {
    const server = fakeServer({ 'POST /api/pumping-tests/1/corrections': () => ({ status: 201, body: makeRecord() }) })
    const form = await mounted()
    await form.get('input[type="checkbox"]').setValue(false)
    expect(form.get('button[type="submit"]').attributes('disabled')).toBeDefined()
    await form.get('input[type="checkbox"]').setValue(true)
    await form.get('form').trigger('submit')
    await settle()
    const { rowVersion: _version, settings, wellIds, active } = makeRecord()
    expect(server.asked[0]!.body).toEqual({ settings, wellIds, active })
  })
})
