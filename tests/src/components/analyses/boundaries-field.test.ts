import { beforeEach, describe, expect, it } from 'vitest'
import { defineComponent, h } from 'vue'
import BoundariesField from '../../../../src/components/analyses/BoundariesField.vue'
import {
  addedBoundary,
  boundaryOf,
  notTaken,
  withFitting,
} from '../../../../src/components/analyses/boundary-choices.ts'
import { provideWorkbench, type Workbench } from '../../../../src/components/analyses/use-workbench.ts'
import { makeTestInputs } from '../../../shared/charts/make-plot.ts'
import { mountWith, settle } from '../../support/mount.ts'
import { makeAnalysis, makeTest } from './make.ts'

beforeEach(() => sessionStorage.clear())

const tarrow = { kind: 'recharge' as const, name: 'Tarrow', distance_m: 618.4, bearing_deg: 225.3 }

/** The form of a draft, of a test 618 m from the Tarrow. */
async function makeForm() {
  const inputs = makeTestInputs()
  inputs.series[0]!.bearing_deg = 90
  const made: Workbench[] = []
  const page = defineComponent({
    setup() {
      made.push(
        provideWorkbench({
          test: () => makeTest(),
          snapshot: () => ({ inputs, sha256: 'a'.repeat(64), readings: [], problems: [], surroundings: [tarrow] }),
          analyses: () => [makeAnalysis({ options: { wellIds: ['o1'], window: null, readingsPerCycle: 5 } })],
          opened: () => null,
        }),
      )
      return () => h(BoundariesField, { label: 'Streams and barriers', most: 2 })
    },
  })
  const form = await mountWith(page)
  const press = async (text: RegExp) => {
    await form
      .findAll('button')
      .find((button) => text.test(button.text()))!
      .trigger('click')
    await settle()
  }
  const texts = () => form.findAll('button').map((button) => button.text().replace(/\s+/g, ' '))
  return { form, press, texts, chosen: () => made[0]!.present.value!.options.boundaries, bench: made[0]! }
}

describe('The form of streams and barriers', () => {
  it('offers what the map knows, with distance and direction, and takes it in', async () => {
    const { press, texts, chosen } = await makeForm()
    expect(texts()).toContain('Take in Tarrow, 620 m south-west')
    await press(/Take in Tarrow/)
    expect(chosen()).toEqual([{ kind: 'recharge', distance_m: 618, bearing_deg: 225 }])
    expect(texts().some((text) => /Take in/.test(text))).toBe(false)
  })

  it('adds at most two, the second square to the first, and removes them', async () => {
    const { press, texts, chosen } = await makeForm()
    await press(/Add a stream/)
    await press(/Add a barrier/)
    expect(chosen()).toEqual([
      { kind: 'recharge', distance_m: null, bearing_deg: 0 },
      { kind: 'barrier', distance_m: null, bearing_deg: 90 },
    ])
    expect(texts()).toEqual(['Remove the stream', 'Remove the barrier'])
    await press(/Remove the stream/)
    expect(chosen()).toEqual([{ kind: 'barrier', distance_m: null, bearing_deg: 90 }])
  })

  it('fits the distance with the curve, and finds it beside T and S', async () => {
    const { press, bench } = await makeForm()
    await press(/Add a barrier/)
    expect(bench.result.value!.others!.map(({ id }) => id)).toEqual(['boundary_1'])
  })
})

describe('A boundary', () => {
  it('keeps the distance that was fitted when it is typed from then on', () => {
    const fitted = addedBoundary('barrier', [])
    expect(withFitting(fitted, false, 431.26)).toEqual({ ...fitted, distance_m: 431 })
    expect(withFitting({ ...fitted, distance_m: 431 }, true, null)).toEqual(fitted)
  })

  it('is offered until it is taken', () => {
    expect(notTaken([tarrow], [])).toEqual([tarrow])
    expect(notTaken([tarrow], [boundaryOf(tarrow)])).toEqual([])
  })
})
