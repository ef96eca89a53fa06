import { beforeEach, describe, expect, it } from 'vitest'
import { defineComponent, h } from 'vue'
import type { Analysis } from '#shared/contracts/analyses.ts'
import ForecastPanel from '../../../../src/components/analyses/ForecastPanel.vue'
import { provideWorkbench } from '../../../../src/components/analyses/use-workbench.ts'
import { makeTestInputs } from '../../../shared/charts/make-plot.ts'
import { mountWith, settle } from '../../support/mount.ts'
import { makeAnalysis, makeTest } from './make.ts'

beforeEach(() => sessionStorage.clear())

/** The panel inside a workbench on which one analysis is open. */
async function makePanel(analysis: Analysis) {
  const inputs = makeTestInputs()
  const snapshot = { inputs, sha256: 'a'.repeat(64), readings: [], problems: [], surroundings: [] }
  const page = defineComponent({
    setup() {
      provideWorkbench({
        test: () => makeTest(),
        snapshot: () => snapshot,
        analyses: () => [analysis],
        opened: () => analysis.id,
      })
      return () => h(ForecastPanel)
    },
  })
  const mounted = await mountWith(page)
  await settle()
  return mounted
}

describe('The forecast on the workbench', () => {
  it('tells drawdown with its band at the times asked for, and what the band holds', async () => {
    const panel = await makePanel(makeAnalysis({ method: 'theis' }))
    expect(panel.findAll('tbody tr')).toHaveLength(3)
    expect(panel.text()).toMatch(/30 d\s*[\d.]+ m\s*[\d.]+ to [\d.]+ m/)
    expect(panel.text()).toContain('It does not hold boundaries')
    expect(panel.text()).toContain('gives no right to abstract')
  })

  it('asks for a distance that it can use', async () => {
    const panel = await makePanel(makeAnalysis({ method: 'theis' }))
    const before = panel.find('tbody').text()
    const distance = panel.find('input')
    await distance.setValue('400')
    await settle()
    expect(panel.find('tbody').text()).not.toBe(before)
    await distance.setValue('0')
    await settle()
    expect(panel.text()).toContain('Give a distance and a time.')
    expect(panel.find('table').exists()).toBe(false)
  })
})
