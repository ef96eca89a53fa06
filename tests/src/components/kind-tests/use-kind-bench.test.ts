import { beforeEach, describe, expect, it } from 'vitest'
import { defineComponent, shallowRef } from 'vue'
import type { Analysis, KindWorkbenchInputs } from '#shared/contracts/analyses.ts'
import { analyseKind } from '#shared/hydraulics/kinds.ts'
import { provideKindBench, type KindBench } from '../../../../src/components/kind-tests/use-kind-bench.ts'
import { makeRepeat, makeSlugInputs } from '../../../shared/hydraulics/make-slug.ts'
import { makeStepInputs } from '../../../shared/hydraulics/make-steps.ts'
import { mountWith, settle } from '../../support/mount.ts'
import { makeAnalysis, makeTest } from '../analyses/make.ts'

// Work that is not saved is kept when a page goes, so it is there after the test.
beforeEach(() => sessionStorage.clear())

const rest = { sha256: 'a'.repeat(64), readings: [], problems: [] }
const slugSnapshot = (inputs = makeSlugInputs()): KindWorkbenchInputs => ({ kind: 'slug', inputs, ...rest })
const options = { repeatIds: null }

const makeSlugAnalysis = (overrides: Partial<Analysis> = {}): Analysis => ({
  ...makeAnalysis(),
  method: 'hvorslev',
  options,
  result: analyseKind('slug', 'hvorslev', makeSlugInputs(), options),
  ...overrides,
})

async function makeBench(given: KindWorkbenchInputs, first: Analysis[] = []) {
  const snapshot = shallowRef(given)
  const analyses = shallowRef<readonly Analysis[]>(first)
  const made: KindBench[] = []
  const page = defineComponent({
    setup() {
      const from = { test: () => makeTest(), snapshot: () => snapshot.value, analyses: () => analyses.value }
      made.push(provideKindBench({ ...from, opened: () => null }))
      return () => null
    },
  })
  await mountWith(page)
  return { bench: made[0]!, analyses, snapshot }
}

describe('The workbench of a test of a kind of its own', () => {
  it('begins with the method whose conditions the test seems to meet', async () => {
    const begun = async (snapshot: KindWorkbenchInputs) => {
      sessionStorage.clear()
      return (await makeBench(snapshot)).bench.present.value?.method
    }
    expect(await begun(slugSnapshot())).toBe('bouwer-rice')
    expect(await begun(slugSnapshot(makeSlugInputs({ aquifer: 'confined' })))).toBe('hvorslev')
    expect(await begun(slugSnapshot(makeSlugInputs({ thickness_m: null })))).toBe('hvorslev')
    const swinging = makeRepeat({ displacement_m: makeRepeat().elapsed_s.map((t) => 0.5 * Math.cos(t / 5)) })
    expect(await begun(slugSnapshot(makeSlugInputs({ repeats: [swinging] })))).toBe('slug-oscillating')
    expect(await begun({ kind: 'step', inputs: makeStepInputs(), ...rest })).toBe('step-linear')
    expect(await begun(slugSnapshot(makeSlugInputs({ repeats: [] })))).toBeUndefined()
  })

  it('begins once the first readings come while it is open', async () => {
    const { bench, snapshot } = await makeBench(slugSnapshot(makeSlugInputs({ repeats: [] })))
    expect(bench.present.value).toBeNull()
    snapshot.value = slugSnapshot()
    await settle()
    expect(bench.present.value?.method).toBe('bouwer-rice')
  })

  it('calculates as settings change, and tells what a method refuses', async () => {
    const { bench } = await makeBench(slugSnapshot())
    const before = bench.result.value!.K!.value
    bench.start('hvorslev')
    expect(bench.result.value!.K!.value).not.toBe(before)
    bench.setOptions({ heads: { from: 0.9, to: 0.2 } })
    expect(bench.result.value).toBeNull()
    expect(bench.outcome.value).toMatchObject({ error: { code: 'analysis/bad-option' } })
  })

  it('shows a kept analysis as it was kept, and changes of it until they are dropped', async () => {
    const kept = makeSlugAnalysis()
    const { bench } = await makeBench(slugSnapshot(), [kept])
    expect(bench.result.value).toBe(kept.result)
    bench.setOptions({ shape: 'screen-at-boundary' })
    expect(bench.changed.value).toBe(true)
    expect(bench.result.value!.K!.value).not.toBe(kept.result.K!.value)
    bench.discard(String(kept.id))
    expect(bench.result.value).toBe(kept.result)
  })

  it('keeps unsaved work over a reload of the page', async () => {
    const first = await makeBench(slugSnapshot())
    first.bench.start('hvorslev')
    first.bench.setWork({ label: 'Second thoughts' })
    window.dispatchEvent(new Event('pagehide'))
    const { bench } = await makeBench(slugSnapshot())
    expect(bench.present.value).toMatchObject({ method: 'hvorslev', label: 'Second thoughts' })
  })

  it('goes on as a new analysis when somebody deleted the draft that was changed', async () => {
    const kept = makeSlugAnalysis()
    const { bench, analyses } = await makeBench(slugSnapshot(), [kept])
    bench.setWork({ label: 'Mine' })
    analyses.value = []
    await settle()
    expect([bench.selected.value, bench.present.value?.label, bench.present.value?.rowVersion]).toEqual([
      'new',
      'Mine',
      null,
    ])
  })

  it('asks before one new analysis takes the place of another that was worked on', async () => {
    const { bench } = await makeBench(slugSnapshot())
    bench.setWork({ label: 'Mine' })
    bench.start('hvorslev')
    expect(bench.present.value?.label).toBe('Mine')
    bench.asking.value!()
    expect(bench.present.value).toMatchObject({ method: 'hvorslev', label: null })
  })

  it('undoes and redoes its changes', async () => {
    const { bench } = await makeBench({ kind: 'step', inputs: makeStepInputs(), ...rest }, [])
    const before = bench.result.value!.others!.find(({ id }) => id === 'C')!.value
    bench.setOptions({ increment_s: 600 })
    bench.setOptions({ trendFrom: 0.5 })
    bench.history.undo()
    bench.history.undo()
    expect(bench.present.value?.options).toEqual({})
    expect(bench.result.value!.others!.find(({ id }) => id === 'C')!.value).toBe(before)
    bench.history.redo()
    expect(bench.present.value?.options).toEqual({ increment_s: 600 })
    expect(bench.history.canRedo.value).toBe(true)
  })
})
