import { beforeEach, describe, expect, it } from 'vitest'
import { defineComponent, h, shallowRef } from 'vue'
import type { TestPlot } from '#shared/charts/test-chart.ts'
import { usePickedReadings, type PickedReadings } from '../../../../src/components/analyses/use-picked-readings.ts'
import { provideWorkbench } from '../../../../src/components/analyses/use-workbench.ts'
import { makePlot, makeTestInputs } from '../../../shared/charts/make-plot.ts'
import { fakeServer, refuse } from '../../support/fake-server.ts'
import { mountWith, settle } from '../../support/mount.ts'
import { makeTest } from './make.ts'

beforeEach(() => sessionStorage.clear())

const decisions = 'POST /api/reading-series/9/decisions'

/** Readings of one log on a plot while they are chosen; reading 7 was left out before. Its rows count from 100. */
async function makePicked(): Promise<PickedReadings> {
  const inputs = makeTestInputs()
  const series = inputs.series[0]!
  series.included[7] = false
  const seq = series.elapsed_s.map((_, i) => 100 + i)
  const readings = [{ wellId: 'o1', seriesId: 9, seq, flags: seq.map(() => '') }]
  const snapshot = { inputs, sha256: 'a'.repeat(64), readings, problems: [], surroundings: [] }
  const made: PickedReadings[] = []
  const plot = defineComponent(() => {
    made.push(usePickedReadings(shallowRef<TestPlot>(makePlot({ inputs }))))
    return () => null
  })
  const page = defineComponent(() => {
    const test = makeTest({ mayEdit: true })
    provideWorkbench({ test: () => test, snapshot: () => snapshot, analyses: () => [], opened: () => null })
    return () => h(plot)
  })
  await mountWith(page)
  made[0]!.picking.value = true
  await settle()
  return made[0]!
}

describe('Readings chosen on the plot', () => {
  it('are left out by the rows of their log, with the reason, and those that are out already are not sent', async () => {
    const { asked } = fakeServer({ [decisions]: () => ({ body: {} }) })
    const picked = await makePicked()
    picked.add(picked.readings.value.filter(({ index }) => index >= 5 && index <= 8))
    expect(await picked.decide({ action: 'leave-out', reason: 'Not steady yet.' })).toBe(true)
    expect(await picked.decide({ action: 'take', reason: 'Steady after all.' })).toBe(true)
    expect(asked.filter(({ method }) => method === 'POST').map(({ body }) => body)).toEqual([
      { seqs: [105, 106, 108], action: 'leave-out', reason: 'Not steady yet.' },
      { seqs: [107], action: 'take', reason: 'Steady after all.' },
    ])
  })

  it('stay chosen, with the problem told, when the server refuses', async () => {
    fakeServer({ [decisions]: () => refuse('pumping-test/not-editable') })
    const picked = await makePicked()
    picked.add(picked.readings.value.slice(0, 3))
    expect(await picked.decide({ action: 'leave-out', reason: 'Not steady yet.' })).toBe(false)
    expect([picked.chosen.value.length, picked.problem.value?.code]).toEqual([3, 'pumping-test/not-editable'])
  })

  it('are chosen and let go one by one', async () => {
    const picked = await makePicked()
    const [first, second] = picked.readings.value
    picked.toggle(first!)
    picked.toggle(second!)
    picked.toggle(first!)
    expect(picked.chosen.value).toEqual([second])
  })
})
