import { beforeAll, describe, expect, it, vi } from 'vitest'
import NewWellForm from '../../../src/components/wells/NewWellForm.vue'
import VisibilityField from '../../../src/components/wells/VisibilityField.vue'
import { makeProblem, fakeServer, type Rules } from '../support/fake-server.ts'
import { mountWith, settle } from '../support/mount.ts'
import { makeSession } from '../support/session.ts'

vi.setConfig({ testTimeout: 30_000 })

/** The coordinate systems come in pieces of their own, which take their time on a busy machine. */
beforeAll(() => Promise.all([import('#shared/geodesy/crs.ts'), import('#shared/geodesy/transform.ts')]), 60_000)

async function mountForm(rules: Rules = {}, props: Record<string, unknown> = {}) {
  const server = fakeServer({ 'GET /api/aquifer-units': () => ({ body: { items: [] } }), ...rules })
  const form = await mountWith(NewWellForm, { props })
  const field = (label: string) => {
    const found = form
      .findAll('.v-field')
      .find((each) => each.find('label').exists() && each.get('label').text() === label)
    if (!found) throw new Error(`There is no field ${label}`)
    return found.get<HTMLInputElement>('input')
  }
  const sent = () =>
    server.asked.filter(({ method }) => method === 'POST').map(({ body }) => body as Record<string, unknown>)
  const save = async () => {
    await form.get('form').trigger('submit')
    await settle()
  }
  return { form, field, sent, save }
}

const taken =
  (path: string, code: string, params = {}) =>
  () => ({
    status: 400,
    body: makeProblem('request/invalid', { fields: [{ path, code, params }] }),
  })

describe('who sees a new well', () => {
  const choicesFor = async (role: 'analyst' | 'steward') => {
    const form = await mountWith(VisibilityField, {
      props: { modelValue: 'internal', label: 'Visibility', errors: [] },
      session: makeSession({ role }),
    })
    const { items } = form.findComponent({ name: 'VSelect' }).props() as { items: { title: string }[] }
    return [items.map(({ title }) => title), form.text().includes('A steward publishes it.')]
  }

  it('is everybody only by the choice of a steward; others are told so', async () => {
    expect(await choicesFor('analyst')).toEqual([['Internal', 'Private'], true])
    expect(await choicesFor('steward')).toEqual([['Published', 'Internal', 'Private'], false])
  })
})

describe('entering a well', () => {
  it('begins in the region’s system and shows where typed coordinates lie', async () => {
    const { form, field } = await mountForm()
    await vi.waitFor(() => expect(form.text()).toContain('East'), { timeout: 20_000 })
    await field('East').setValue('482540')
    await field('North').setValue('5748670')
    await vi.waitFor(() => expect(form.text()).toContain('38.41004° S, 21.19999° W'), { timeout: 20_000 })
  })

  it('asks whether latitude and longitude are exchanged, and takes the place that was meant', async () => {
    const { form, field } = await mountForm({}, { at: { lon: -38.4, lat: -21.2 } })
    await vi.waitFor(() => expect(form.text()).toContain('swapped'), { timeout: 20_000 })
    await form
      .findAll('button')
      .find((button) => button.text() === 'Take it')!
      .trigger('click')
    expect([field('Longitude').element.value, field('Latitude').element.value]).toEqual(['-21.2', '-38.4'])
    expect(form.text()).not.toContain('swapped')
  })

  it('sends what was typed in SI and says which well was made', async () => {
    const { form, field, sent, save } = await mountForm(
      { 'POST /api/wells': () => ({ status: 201, body: { id: 12 } }) },
      { at: { lon: -21.2, lat: -38.4 } },
    )
    await field('Code').setValue('T-1')
    await field('Depth').setValue('64')
    await form
      .findAll('button')
      .find((button) => button.text() === 'Add a screen')!
      .trigger('click')
    await field('Top, below ground').setValue('20')
    await field('Bottom, below ground').setValue('40,5')
    await save()
    expect(sent()[0]).toMatchObject({
      code: 'T-1',
      name: null,
      x: -21.2,
      y: -38.4,
      epsg: 4326,
      depthM: 64,
      screens: [{ topM: 20, bottomM: 40.5, validFrom: null, validTo: null }],
    })
    expect(form.emitted('created')).toEqual([[12]])
  })

  it('puts an error under its field', async () => {
    const { form, save } = await mountForm({ 'POST /api/wells': taken('code', 'well/code-taken', { code: 'T-1' }) })
    await save()
    expect(form.text()).toContain('There is a well T-1 already.')
    expect(form.emitted('created')).toBeUndefined()
  })

  it('lets a place outside the region be confirmed', async () => {
    const { form, sent, save } = await mountForm({
      'POST /api/wells': taken('x', 'well/outside-region', { distanceKm: 120 }),
    })
    expect(form.find('input[type="checkbox"]').exists()).toBe(false)
    await save()
    await form.get('input[type="checkbox"]').setValue(true)
    await save()
    expect(sent().map(({ confirmOutside }) => confirmOutside)).toEqual([false, true])
  })
})
