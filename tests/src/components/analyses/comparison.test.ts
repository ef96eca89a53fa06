import { beforeEach, describe, expect, it } from 'vitest'
import { defineComponent, h } from 'vue'
import type { Analysis } from '#shared/contracts/analyses.ts'
import ComparisonPanel from '../../../../src/components/analyses/ComparisonPanel.vue'
import { numbered } from '../../../../src/components/analyses/use-compared.ts'
import { provideWorkbench } from '../../../../src/components/analyses/use-workbench.ts'
import { makeFit, makeTestInputs } from '../../../shared/charts/make-plot.ts'
import { mountWith, settle } from '../../support/mount.ts'
import { makeAnalysis, makeTest } from './make.ts'

beforeEach(() => sessionStorage.clear())

async function makePanel(analyses: Analysis[]) {
  const page = defineComponent({
    setup() {
      provideWorkbench({
        test: () => makeTest({ wellCode: 'P-1', startLocal: '2025-05-03T09:00' }),
        snapshot: () => ({
          inputs: makeTestInputs(),
          sha256: 'a'.repeat(64),
          readings: [],
          problems: [],
          surroundings: [],
        }),
        analyses: () => analyses,
        opened: () => null,
      })
      return () => h(ComparisonPanel)
    },
  })
  const panel = await mountWith(page)
  await settle()
  const rows = () => panel.findAll('tbody tr').map((row) => row.text().replace(/\s+/g, ' '))
  return { panel, rows }
}

const kept = (id: number, method: 'theis' | 'leaky' | 'cooper-jacob', overrides: Partial<Analysis> = {}) =>
  makeAnalysis({ id, method, result: makeFit(method).result, state: 'submitted', mayEdit: false, ...overrides })

describe('The comparison of analyses', () => {
  it('sets all that are evidence beside each other, the open one first', async () => {
    const { rows } = await makePanel([
      kept(1, 'theis'),
      kept(2, 'cooper-jacob'),
      kept(3, 'theis', { state: 'returned' }),
      kept(4, 'theis', { state: 'accepted', label: 'The one adopted' }),
    ])
    expect(rows().map((row) => row.includes('The one adopted'))).toEqual([true, false, false])
    expect(rows()[1]).toMatch(/Confined aquifer curve.*1\.00/)
  })

  it('says nothing where there is only one', async () => {
    const { panel } = await makePanel([kept(1, 'theis')])
    expect(panel.find('section').exists()).toBe(false)
  })

  it('says what AICc does not tell', async () => {
    const { panel } = await makePanel([kept(1, 'theis'), kept(2, 'leaky')])
    expect(panel.text()).toContain('It compares fits, not geology')
  })

  it('draws the curves that are chosen', async () => {
    const { panel } = await makePanel([kept(1, 'theis'), kept(2, 'cooper-jacob')])
    const label = () => panel.find('[role="img"].picture').attributes('aria-label')
    expect(label()).toContain('2 analyses')
    await panel.find('tbody input[type="checkbox"]').setValue(false)
    expect(label()).toContain('one analysis')
  })
})

describe('Analyses of one name', () => {
  it('are told apart by a number', () => {
    const labels = numbered([{ label: 'Line' }, { label: 'Curve' }, { label: 'Line' }]).map(({ label }) => label)
    expect(labels).toEqual(['Line 1', 'Curve', 'Line 2'])
  })
})
