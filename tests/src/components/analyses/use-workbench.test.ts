import { beforeEach, describe, expect, it } from 'vitest'
import { defineComponent, shallowRef } from 'vue'
import type { Analysis, WorkbenchInputs } from '#shared/contracts/analyses.ts'
import { provideWorkbench, type Workbench } from '../../../../src/components/analyses/use-workbench.ts'
import { makeTestInputs } from '../../../shared/charts/make-plot.ts'
import { mountWith, settle } from '../../support/mount.ts'
import { makeAnalysis, makeTest } from './make.ts'

// Work that is not saved is kept when a page goes, so it is there after the test.
beforeEach(() => sessionStorage.clear())

const doubled = (inputs = makeTestInputs()) => ({
  ...inputs,
  rates: inputs.rates.map((step) => ({ ...step, rate_m3_s: 2 * step.rate_m3_s })),
})
const makeSnapshot = (inputs = makeTestInputs()): WorkbenchInputs => ({
  inputs,
  sha256: 'a'.repeat(64),
  readings: [],
  problems: [],
  surroundings: [],
})

/** The workbench of a test whose analyses and inputs the test can change. */
async function makeBench(first: Analysis[], inputs = makeTestInputs()) {
  const analyses = shallowRef<readonly Analysis[]>(first)
  const made: Workbench[] = []
  const page = defineComponent({
    setup() {
      const given = { test: () => makeTest(), snapshot: () => makeSnapshot(inputs), analyses: () => analyses.value }
      made.push(provideWorkbench({ ...given, opened: () => null }))
      return () => null
    },
  })
  await mountWith(page)
  return { bench: made[0]!, analyses }
}

const window = { from_s: 600, to_s: 60_000 }

describe('The workbench', () => {
  it('calculates a draft anew when its inputs have changed, so that it can be saved as it is shown', async () => {
    const draft = makeAnalysis({ inputsChanged: true })
    const { bench } = await makeBench([draft], doubled())
    expect(bench.result.value!.T!.value / draft.result.T!.value).toBeCloseTo(2, 3)
  })

  it('shows what was adopted as it was adopted, also when the inputs have changed since', async () => {
    const accepted = makeAnalysis({ state: 'accepted', mayEdit: false, inputsChanged: true })
    const { bench } = await makeBench([accepted], doubled())
    expect(bench.result.value).toBe(accepted.result)
  })

  it('shows a submitted analysis without changes that were not saved before', async () => {
    const { bench, analyses } = await makeBench([makeAnalysis()])
    bench.setOptions({ window })
    expect(bench.changed.value).toBe(true)
    analyses.value = [makeAnalysis({ state: 'submitted', mayEdit: false })]
    await settle()
    expect([bench.changed.value, bench.isChanged('3'), bench.present.value?.options.window]).toEqual([
      false,
      false,
      null,
    ])
  })

  it('keeps what was changed while the analysis was being saved, as a change of the saved one', async () => {
    const { bench, analyses } = await makeBench([])
    bench.setOptions({ window })
    const sent = bench.unsavedOf('new')
    bench.setOptions({ window: { ...window, to_s: 70_000 } })
    const saved = makeAnalysis({ id: 9, method: 'cooper-jacob', options: { wellIds: ['o1'], window }, rowVersion: 4 })
    analyses.value = [saved]
    bench.settle('new', sent, saved)
    expect(bench.selected.value).toBe('9')
    expect(bench.present.value).toMatchObject({ options: { window: { to_s: 70_000 } }, rowVersion: 4 })
    expect(bench.hasNew.value).toBe(false)
  })

  it('has nothing unsaved after saving when nothing was changed meanwhile', async () => {
    const { bench, analyses } = await makeBench([makeAnalysis()])
    bench.setOptions({ window })
    const saved = makeAnalysis({ options: { wellIds: ['o1'], window }, rowVersion: 2 })
    analyses.value = [saved]
    bench.settle('3', bench.unsavedOf('3'), saved)
    expect(bench.changed.value).toBe(false)
  })

  it('keeps the changes of a draft that somebody else deleted, as a new analysis', async () => {
    const { bench, analyses } = await makeBench([makeAnalysis()])
    bench.setOptions({ window })
    analyses.value = []
    await settle()
    expect([bench.selected.value, bench.present.value?.options.window]).toEqual(['new', window])
  })

  it('begins no analysis of a well that was not pumped', async () => {
    const inputs = makeTestInputs()
    const { bench } = await makeBench([], { ...inputs, rates: [{ start_s: 0, rate_m3_s: 0 }] })
    expect([bench.selected.value, bench.outcome.value]).toEqual([null, null])
  })

  it('asks before a new analysis takes the place of one that was changed, and only then', async () => {
    const { bench } = await makeBench([])
    bench.start('theis')
    expect(bench.present.value?.method).toBe('theis')
    bench.setOptions({ window })
    bench.start('recovery')
    expect([bench.present.value?.method, bench.asking.value === null]).toEqual(['theis', false])
    bench.asking.value?.()
    expect([bench.present.value?.method, bench.asking.value]).toEqual(['recovery', null])
  })
})
