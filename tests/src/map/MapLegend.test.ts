import { describe, expect, it, vi } from 'vitest'
import { valueClasses } from '#shared/charts/value-classes.ts'
import MapLegend from '../../../src/components/map/MapLegend.vue'
import { useMapChoice } from '../../../src/stores/map.ts'
import { mountWith } from '../support/mount.ts'
import { makeMapWell, makeOnMap, makeStream } from './make.ts'

const wells = [makeMapWell({ value: 1e-3, evidence: 'firm' }), makeMapWell()]

async function mountLegend(visible = makeOnMap({ wells, streams: [makeStream()] })) {
  vi.stubGlobal('matchMedia', () => Object.assign(new EventTarget(), { matches: true }))
  const legend = await mountWith(MapLegend, { props: { visible, classes: valueClasses('T', 'm2/d') } })
  const button = (name: string) =>
    legend.findAll('button').find((found) => found.attributes('aria-label') === name || found.text().endsWith(name))!
  return { legend, button, choice: useMapChoice() }
}

describe('the legend card', () => {
  it('leaves only the wells of an entry, and all of them again', async () => {
    const { button, choice } = await mountLegend()
    await button('firm').trigger('click')
    expect(choice.filter).toEqual({ kind: 'only', only: 'firm' })
    expect(button('firm').attributes('aria-pressed')).toBe('true')
    await button('firm').trigger('click')
    expect(choice.filter).toBeNull()
  })

  it('leaves only the wells of a class of the ramp', async () => {
    const { button, choice } = await mountLegend()
    await button('30 to 100').trigger('click')
    expect(choice.filter).toEqual({ kind: 'class', index: 2 })
    await button('Show all wells').trigger('click')
    expect(choice.filter).toBeNull()
  })

  it('takes a layer off the map and keeps the keyboard in the legend', async () => {
    const { legend, button, choice } = await mountLegend()
    await button('stream').trigger('click')
    expect(choice.layers.streams).toBe(false)
    await vi.waitFor(() => expect(legend.element.contains(document.activeElement)).toBe(true))
  })

  it('names the value and its unit, and has no ramp where no well has a value', async () => {
    expect((await mountLegend()).legend.text()).toContain('Transmissivity, m²/d')
    expect((await mountLegend(makeOnMap({ wells: [makeMapWell()] }))).legend.text()).not.toContain('Transmissivity')
  })

  it('begins anew with another unit or parameter', async () => {
    const { choice } = await mountLegend()
    choice.toggleFilter({ kind: 'class', index: 1 })
    choice.chooseParameter('K')
    expect(choice.filter).toBeNull()
    choice.toggleFilter({ kind: 'class', index: 1 })
    choice.chooseUnit(2)
    expect(choice.filter).toBeNull()
  })
})
