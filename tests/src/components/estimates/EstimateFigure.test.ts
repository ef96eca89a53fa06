import { describe, expect, it } from 'vitest'
import EstimateFigure from '../../../../src/components/estimates/EstimateFigure.vue'
import { usePreferences } from '../../../../src/stores/preferences.ts'
import { fakeServer } from '../../support/fake-server.ts'
import { mountWith, settle } from '../../support/mount.ts'
import { makeEstimate } from './make.ts'

const mounted = (overrides = {}) =>
  mountWith(EstimateFigure, { props: { estimate: makeEstimate(overrides), lit: null } })
const plain = (text: string) => text.replaceAll('\u202f', ' ')

describe('the figure of an estimate', () => {
  it('shows the median with its unit, both intervals, the support and the first caution', async () => {
    const text = plain((await mounted()).text())
    // 1e-2 m²/s times 86 400 s/d.
    expect(text).toContain('864')
    expect(text).toContain('m²/d transmissivity, median')
    expect(text).toContain('433 to 1 720 m²/d')
    expect(text).toContain('273 to 2 730 m²/d')
    expect(text).toContain('Well supported')
    expect(text).toContain('An estimate is for planning.')
  })

  it('says in words what the drawing shows', async () => {
    const drawing = (await mounted()).get('svg.strip')
    expect(plain(drawing.attributes('aria-label')!)).toBe(
      'Median 864 m²/d; 80 % interval 433 to 1 720 m²/d; 95 % interval 273 to 2 730 m²/d; 2 values carried it.',
    )
  })

  it('draws a dot for each value, the larger the heavier', async () => {
    const radii = (await mounted()).findAll('circle').map((dot) => Number(dot.attributes('r')))
    expect(radii).toHaveLength(2)
    expect(radii[0]!).toBeGreaterThan(radii[1]!)
  })

  it('turns to what a new test would show, which is wider', async () => {
    const figure = await mounted()
    await figure.findAll('button')[1]!.trigger('click')
    await settle()
    expect(plain(figure.text())).toContain('137 to 5 450 m²/d')
    expect(figure.text()).toContain('Wider than for the true value')
  })

  it('follows a switch of units', async () => {
    fakeServer({ 'PUT /api/account/preferences': ({ body }) => ({ body }) })
    const figure = await mounted()
    await usePreferences().choose({ unitSystem: 'si' })
    await settle()
    expect(figure.text()).toContain('m²/s transmissivity, median')
    expect(figure.text()).toContain('0.0100')
  })

  it('has no unit before the name where the quantity has none', async () => {
    expect((await mounted({ quantity: 'Sy' })).text()).toContain('specific yield, median')
  })
})
