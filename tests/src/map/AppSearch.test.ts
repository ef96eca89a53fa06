import { beforeAll, describe, expect, it, vi } from 'vitest'
import type { SearchHit } from '#shared/contracts/map.ts'
import AppSearch from '../../../src/components/shell/AppSearch.vue'
import { fakeServer, refuse } from '../support/fake-server.ts'
import { mountWith, settle } from '../support/mount.ts'

const makeHit = (overrides: Partial<SearchHit> = {}): SearchHit => ({
  kind: 'well',
  id: 7,
  title: 'V-0007',
  facts: 'well, 40 m deep',
  lon: -21.2,
  lat: -38.4,
  ...overrides,
})

vi.setConfig({ testTimeout: 30_000 })

/** The coordinate systems come in a piece of their own, which takes its time on a busy machine. */
beforeAll(() => import('../../../src/components/shell/read-place.ts'), 60_000)

async function mountSearch(items: SearchHit[] = [makeHit(), makeHit({ id: 8, title: 'V-0008' })]) {
  const server = fakeServer({ 'GET /api/search': () => ({ body: { items } }) })
  const search = await mountWith(AppSearch)
  const input = search.get<HTMLInputElement>('input')
  const type = async (text: string) => {
    await input.setValue(text)
    await new Promise((resolve) => setTimeout(resolve, 220))
    await settle()
  }
  const options = () => search.findAll('[role="option"]').map((option) => option.text())
  let opened = ''
  // Where it leads counts, not the page there: that would load the whole map.
  search.vm.$router.beforeEach((to) => {
    opened = to.fullPath
    return false
  })
  const path = () => opened
  return { server, search, input, type, options, path }
}

describe('the search box', () => {
  it('asks nothing while it is empty', async () => {
    const { server, input } = await mountSearch()
    await input.trigger('focus')
    expect(server.asked).toEqual([])
    expect(input.attributes('aria-expanded')).toBe('false')
  })

  it('offers what the server found, and opens what is chosen by keyboard', async () => {
    const { input, type, options, path, search } = await mountSearch()
    await type('v-000')
    expect(options()).toEqual([expect.stringContaining('V-0007'), expect.stringContaining('V-0008')])
    await input.trigger('keydown', { key: 'ArrowDown' })
    await input.trigger('keydown', { key: 'ArrowDown' })
    const active = search.get(`#${CSS.escape(input.attributes('aria-activedescendant')!)}`)
    expect(active.attributes('aria-selected')).toBe('true')
    expect(active.text()).toContain('V-0008')
    await input.trigger('keydown', { key: 'Enter' })
    await settle()
    expect(path()).toBe('/map/wells/8')
  })

  it('goes round at both ends', async () => {
    const { input, type, search } = await mountSearch()
    await type('v')
    await input.trigger('keydown', { key: 'ArrowUp' })
    expect(search.get('[aria-selected="true"]').text()).toContain('V-0008')
    await input.trigger('keydown', { key: 'ArrowDown' })
    expect(search.get('[aria-selected="true"]').text()).toContain('V-0007')
  })

  it('opens the first with Enter alone', async () => {
    const { input, type, path } = await mountSearch()
    await type('v-0007')
    await input.trigger('keydown', { key: 'Enter' })
    await settle()
    expect(path()).toBe('/map/wells/7')
  })

  it.each([
    ['-38.41, -21.20', '38.4100° S, 21.2000° W'],
    ['32727: 482540 5748670', '38.4100° S, 21.2000° W'],
  ])('reads %s as a place', async (text, place) => {
    const { type, options, input, path } = await mountSearch([])
    await type(text)
    await vi.waitFor(() => expect(options()).toHaveLength(1), { timeout: 20_000 })
    expect(options()[0]).toContain(place)
    await input.trigger('keydown', { key: 'Enter' })
    await settle()
    expect(path()).toMatch(/^\/map\/place\/-38\.4[01]\d*,-21\.(20|19)/)
  })

  it('offers the place that was meant when latitude and longitude are exchanged', async () => {
    const { type, options } = await mountSearch([])
    await type('-21.20, -38.41')
    await vi.waitFor(() => expect(options()).toHaveLength(2), { timeout: 20_000 })
    expect(options()[0]).toContain('38.4100° S, 21.2000° W')
    expect(options()[0]).toContain('swapped')
  })

  it('says why coordinates cannot be read', async () => {
    const { type, search } = await mountSearch([])
    await type('1234: 482540 5748670')
    await vi.waitFor(() => expect(search.text()).toContain('EPSG:1234 is not among the offered'), { timeout: 20_000 })
  })

  it('says that nothing was found', async () => {
    const { type, search } = await mountSearch([])
    await type('nowhere')
    expect(search.text()).toContain('Nothing is called “nowhere”')
  })

  it('shows hostile names as text', async () => {
    const { type, search, options } = await mountSearch([makeHit({ title: '<img src=x onerror=alert(1)>' })])
    await type('img')
    expect(options()[0]).toContain('<img src=x')
    expect(search.find('img').exists()).toBe(false)
  })

  it('closes with Escape, then empties', async () => {
    const { input, type } = await mountSearch()
    await type('v')
    expect(input.attributes('aria-expanded')).toBe('true')
    await input.trigger('keydown', { key: 'Escape' })
    expect(input.attributes('aria-expanded')).toBe('false')
    await input.trigger('keydown', { key: 'Escape' })
    expect(input.element.value).toBe('')
  })

  it('says what went wrong when the search fails', async () => {
    fakeServer({ 'GET /api/search': () => refuse('server/failed') })
    const search = await mountWith(AppSearch)
    await search.get('input').setValue('v')
    await vi.waitFor(() => expect(search.get('.message').text()).not.toBe(''), { timeout: 20_000 })
  })
})
