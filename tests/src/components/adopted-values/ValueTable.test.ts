import { describe, expect, it } from 'vitest'
import ValueTable from '../../../../src/components/adopted-values/ValueTable.vue'
import { mountWith } from '../../support/mount.ts'
import { makeAdoptedValue } from './make.ts'

const values = [makeAdoptedValue(), makeAdoptedValue({ id: 6, wellCode: 'V-0022', evidence: 'firm' })]
const mounted = (props = {}) =>
  mountWith(ValueTable, { props: { values, total: 2, sort: 'well', opened: null, loading: false, ...props } })

describe('the regional table', () => {
  it('tells each value in a row, with unit, interval, error, evidence, method, thickness and year', async () => {
    const row = (await mounted()).findAll('tbody tr')[0]!
    expect(row.findAll('th, td').map((cell) => cell.text().replaceAll('\u202f', ' '))).toEqual([
      'V-0021',
      'Tarrow Gravels',
      'Transmissivity',
      '86.4 m²/d',
      '34.4 to 217 m²/d',
      '× 1.6',
      'fair',
      'Confined aquifer curve (Theis)',
      'whole unit',
      '1996',
      '',
    ])
  })

  it('opens a row by click and by Enter, and walks rows by arrow keys', async () => {
    const table = await mounted()
    const [first, second] = table.findAll('tbody tr')
    await first!.trigger('click')
    await second!.trigger('keydown', { key: 'Enter' })
    expect(table.emitted('open')).toEqual([[5], [6]])
    ;(first!.element as HTMLElement).focus()
    await first!.trigger('keydown', { key: 'ArrowDown' })
    await table.vm.$nextTick()
    expect(document.activeElement).toBe(second!.element)
  })

  it('asks the server for another order', async () => {
    const table = await mounted({ sort: 'year' })
    const head = (title: string) => table.findAll('thead th').find((cell) => cell.text() === title)!
    await head('Year').trigger('click')
    await head('Value').trigger('click')
    expect(table.emitted('sort')!.map(([sort]) => sort)).toContain('-year')
    expect(table.emitted('sort')!.map(([sort]) => sort)).toContain('value')
  })

  it('marks the row whose sheet is open', async () => {
    const rows = (await mounted({ opened: 6 })).findAll('tbody tr')
    expect(rows.map((row) => row.attributes('aria-current'))).toEqual([undefined, 'true'])
  })
})
