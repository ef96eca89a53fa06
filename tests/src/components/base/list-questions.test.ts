import { describe, expect, it, vi } from 'vitest'
import type { Component } from 'vue'
import AuditTrailView from '../../../../src/views/AuditTrailView.vue'
import PeopleView from '../../../../src/views/PeopleView.vue'
import PumpingTestsView from '../../../../src/views/PumpingTestsView.vue'
import { fakeServer } from '../../support/fake-server.ts'
import { mountWith, settle } from '../../support/mount.ts'
import { makeSession } from '../../support/session.ts'

const total = 120
const unit = { id: 3, code: 'TG', name: 'Tarrow Gravels', kind: 'unconfined', depthOrder: 1, description: null }
const units = { items: [{ ...unit, outline: [], valueCounts: { T: 0, S: 0, K: 0 } }] }
/** Longer than the pause after which typed letters are asked for. */
const pause = () => new Promise((resolve) => setTimeout(resolve, 300))

async function open(view: Component, path: string) {
  const page = { body: { items: [], total, next: 50 } }
  const { asked } = fakeServer({
    'GET /api/pumping-tests': () => page,
    'GET /api/people': () => page,
    'GET /api/audit-trail': () => page,
    'GET /api/aquifer-units': () => ({ body: units }),
  })
  const shown = await mountWith(view, { path, session: makeSession({ role: 'administrator' }) })
  await settle()
  const [list] = path.split('?')
  const lists = () => asked.filter((one) => /pumping-tests|people|audit-trail/.test(one.path))
  return {
    shown,
    list,
    lastAsked: () => Object.fromEntries(new URLSearchParams(lists().at(-1)!.path.split('?')[1])),
    address: () => shown.vm.$route.fullPath,
    field: (label: string) => {
      const found = shown.findAll('.v-input').find((input) => input.find('label').text() === label)
      if (!found) throw new Error(`There is no field ${label}`)
      return found
    },
    go: async (to: string) => {
      await shown.vm.$router.push(to)
      await settle()
    },
  }
}

const rows = { limit: '50', offset: '0' }

describe('the list of tests', () => {
  it('asks what its address says, and shows it in its fields', async () => {
    const { lastAsked, field } = await open(
      PumpingTestsView,
      '/pumping-tests?text=tin+box&unit=3&state=accepted&kind=step&sort=well&page=2',
    )
    expect(lastAsked()).toEqual({
      ...{ text: 'tin box', unitId: '3', state: 'accepted', kind: 'step', sort: 'well', limit: '50', offset: '50' },
    })
    expect((field('Well or source').find('input').element as HTMLInputElement).value).toBe('tin box')
    expect(field('Aquifer unit').text()).toContain('Tarrow Gravels')
    expect(field('State').text()).toContain('Accepted')
    expect(field('Order').text()).toContain('By well')
  })

  it('leaves out what makes no sense', async () => {
    const { lastAsked } = await open(PumpingTestsView, '/pumping-tests?unit=x&state=lost&sort=size&page=-1')
    expect(lastAsked()).toEqual({ sort: '-start', ...rows })
  })

  it('keeps a typed text in the address, from the first page, and follows the way back', async () => {
    const { field, address, lastAsked, go } = await open(PumpingTestsView, '/pumping-tests?state=open&page=2')
    const text = field('Well or source').find('input')
    await text.setValue('V-0')
    await pause()
    await settle()
    expect(address()).toBe('/pumping-tests?text=V-0&state=open')
    expect(lastAsked()).toEqual({ text: 'V-0', state: 'open', sort: '-start', ...rows })
    await go('/pumping-tests?kind=slug')
    expect((text.element as HTMLInputElement).value).toBe('')
    expect(lastAsked()).toEqual({ kind: 'slug', sort: '-start', ...rows })
  })

  it('goes to the last page where the address names a later one', async () => {
    const { address, lastAsked } = await open(PumpingTestsView, '/pumping-tests?kind=slug&page=9')
    await vi.waitFor(() => expect(address()).toBe('/pumping-tests?kind=slug&page=3'))
    expect(lastAsked()).toMatchObject({ offset: '100' })
  })
})

describe('the list of people', () => {
  it('asks what its address says, and keeps a chosen role in it', async () => {
    const { shown, lastAsked, address } = await open(PeopleView, '/settings/people?text=ada&state=invited')
    expect(lastAsked()).toEqual({ search: 'ada', state: 'invited', ...rows })
    const [roles] = shown.findAllComponents({ name: 'VSelect' })
    roles!.vm.$emit('update:modelValue', 'steward')
    await vi.waitFor(() => expect(address()).toBe('/settings/people?text=ada&role=steward&state=invited'))
    expect(lastAsked()).toEqual({ search: 'ada', role: 'steward', state: 'invited', ...rows })
  })
})

describe('the audit trail', () => {
  it('asks for the days of its address, the last one included, in the reader’s zone', async () => {
    const { lastAsked, field, address } = await open(
      AuditTrailView,
      '/settings/audit-trail?person=Keeper&action=wells/edit&from=2026-03-01&to=2026-02-31',
    )
    const midnight = (day: number) => new Date(2026, 2, day).toISOString()
    // There is no 31st of February.
    expect(lastAsked()).toEqual({ actor: 'Keeper', action: 'wells/edit', from: midnight(1), ...rows })
    await field('To day').find('input').setValue('2026-03-05')
    await vi.waitFor(() => expect(lastAsked()).toMatchObject({ from: midnight(1), to: midnight(6) }))
    expect(address()).toBe('/settings/audit-trail?person=Keeper&action=wells/edit&from=2026-03-01&to=2026-03-05')
  })
})
