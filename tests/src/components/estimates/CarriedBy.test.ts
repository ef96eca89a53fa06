import { describe, expect, it } from 'vitest'
import CarriedBy from '../../../../src/components/estimates/CarriedBy.vue'
import { mountWith } from '../../support/mount.ts'
import { makeContribution, makeEstimate } from './make.ts'

const mounted = (overrides = {}) => mountWith(CarriedBy, { props: { estimate: makeEstimate(overrides), lit: null } })
const many = Array.from({ length: 9 }, (_, i) =>
  makeContribution({ valueId: i + 1, wellCode: `V-${i}`, weight: 1 / 9 }),
)

describe('what carried an estimate', () => {
  it('is told with distance, compass point, value, evidence and weight', async () => {
    const cells = (await mounted())
      .findAll('tbody tr')[0]!
      .findAll('td')
      .map((cell) => cell.text())
    expect(cells).toEqual(['V-0001', '1.3 km NE', '86.4', 'firm', '0.60'])
  })

  it('leads to each well', async () => {
    expect((await mounted()).get('tbody a').attributes('href')).toBe('/map/wells/21')
  })

  it('is short at first, says how much of the weight is shown, and can be told whole', async () => {
    const list = await mounted({ contributions: many })
    expect(list.findAll('tbody tr')).toHaveLength(6)
    expect(list.text()).toContain('These carry 67 % of the weight.')
    await list.get('button').trigger('click')
    expect(list.findAll('tbody tr')).toHaveLength(9)
  })

  it('points at a value by mouse and by keyboard, and lets go of it', async () => {
    const list = await mounted()
    const row = list.findAll('tbody tr')[1]!
    await row.trigger('mouseenter')
    await list.get('tbody').trigger('mouseleave')
    await row.trigger('focusin')
    await list.get('tbody').trigger('focusout')
    expect(list.emitted('update:lit')).toEqual([[2], [null], [2], [null]])
  })

  it('is a list of the nearest values, without weights, where there is no estimate', async () => {
    const list = await mounted({ truth: null, contributions: [makeContribution({ weight: 0 })] })
    expect(list.get('h2').text()).toBe('Nearest values')
    expect(list.findAll('thead th').map((cell) => cell.text())).not.toContain('Weight')
  })

  it('is nothing at all without values', async () => {
    expect((await mounted({ contributions: [] })).find('table').exists()).toBe(false)
  })
})
