import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { computed, shallowRef } from 'vue'
import type { AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import { useCalculation, type Asked } from '../../../../src/components/workbench/use-calculation.ts'
import { makeTestInputs } from '../../../shared/charts/make-plot.ts'
import { runWith } from '../../support/mount.ts'

beforeEach(() => vi.useFakeTimers())
afterEach(() => {
  vi.useRealTimers()
  vi.restoreAllMocks()
})

const makeAsked = (options: Partial<AnalysisOptions> = {}, overrides: Partial<Asked> = {}): Asked => ({
  key: 'new',
  method: 'theis',
  options: { wellIds: ['o1'], window: null, ...options },
  inputs: makeTestInputs(),
  kept: null,
  ...overrides,
})
const window = { from_s: 600, to_s: 60_000 }

/** A calculation on a clock that moves by so much whenever it is looked at. */
function makeCalculation(took_ms: number) {
  let now = 0
  vi.spyOn(performance, 'now').mockImplementation(() => (now += took_ms))
  const asked = shallowRef<Asked | null>(makeAsked())
  const calculation = runWith(() => useCalculation(computed(() => asked.value)))
  const readings = () => {
    const { value } = calculation.outcome
    return value && 'result' in value ? value.result.fit.n : null
  }
  return { asked, readings, waiting: calculation.waiting, all: readings() }
}

describe('A calculation', () => {
  it('follows at once where it is quick', () => {
    const { asked, readings, waiting, all } = makeCalculation(5)
    asked.value = makeAsked({ window })
    expect(readings()).toBeLessThan(all!)
    expect(waiting.value).toBe(false)
  })

  it('waits for the hand to rest where it is slow, and shows what was there', () => {
    const { asked, readings, waiting, all } = makeCalculation(500)
    asked.value = makeAsked({ window })
    expect([readings(), waiting.value]).toEqual([all, true])
    vi.advanceTimersByTime(150)
    asked.value = makeAsked({ window: { ...window, to_s: 50_000 } })
    vi.advanceTimersByTime(150)
    expect([readings(), waiting.value]).toEqual([all, true])
    vi.advanceTimersByTime(100)
    expect(readings()).toBeLessThan(all!)
    expect(waiting.value).toBe(false)
  })

  it('never shows the numbers of one analysis under another, however slow', () => {
    const { asked, readings, waiting, all } = makeCalculation(500)
    asked.value = makeAsked({ window }, { key: '7' })
    expect(readings()).toBeLessThan(all!)
    expect(waiting.value).toBe(false)
  })
})
