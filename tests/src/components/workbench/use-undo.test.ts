import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { ref, shallowRef } from 'vue'
import type { Work } from '../../../../src/components/analyses/kept-work.ts'
import { changedPart, useUndo } from '../../../../src/components/workbench/use-undo.ts'

const wellIds = ['o1']
const makeWork = (to_s: number, overrides: Partial<Work> = {}): Work => ({
  method: 'theis',
  options: { wellIds, window: { from_s: 60, to_s } },
  label: null,
  rowVersion: 1,
  ...overrides,
})

beforeEach(() => void vi.useFakeTimers())
afterEach(() => void vi.useRealTimers())

const kept = makeWork(0)

/** Unsaved work of a draft, changed as the workbench changes it, a while apart. */
function makeDesk() {
  const works = shallowRef<Record<string, Work>>({})
  const selected = ref<string | null>('3')
  const put = (key: string, work: Work | null) => {
    const { [key]: _gone, ...others } = works.value
    works.value = work ? { ...others, [key]: work } : others
  }
  const history = useUndo(works, selected, put)
  const change = (work: Work, { apart_ms = 2000 } = {}) => {
    vi.advanceTimersByTime(apart_ms)
    const key = selected.value!
    history.remember(key, works.value[key] ?? null, changedPart(works.value[key] ?? kept, work))
    put(key, work)
  }
  const end = () => works.value[selected.value!]?.options.window?.to_s
  return { works, selected, history, change, end }
}

describe('Undo on the workbench', () => {
  it('goes back to the analysis as it is kept, and forth again', () => {
    const { works, history, change, end } = makeDesk()
    change(makeWork(100))
    change(makeWork(200))
    history.undo()
    expect(end()).toBe(100)
    history.undo()
    expect([works.value, history.canUndo.value]).toEqual([{}, false])
    history.redo()
    history.redo()
    expect([end(), history.canRedo.value]).toEqual([200, false])
  })

  it('takes a drag as one change, and two settings as two', () => {
    const { works, history, change, end } = makeDesk()
    for (let to_s = 100; to_s <= 500; to_s += 10) change(makeWork(to_s), { apart_ms: 16 })
    change({ ...works.value['3']!, label: 'Late part' }, { apart_ms: 16 })
    history.undo()
    expect([end(), works.value['3']!.label]).toEqual([500, null])
    history.undo()
    expect(works.value).toEqual({})
  })

  it('has nothing to redo once something else was changed', () => {
    const { history, change } = makeDesk()
    change(makeWork(100))
    history.undo()
    change(makeWork(300))
    expect(history.canRedo.value).toBe(false)
  })

  it('keeps the changes of each analysis apart', () => {
    const { selected, history, change, end } = makeDesk()
    change(makeWork(100))
    selected.value = '4'
    expect(history.canUndo.value).toBe(false)
    change(makeWork(700))
    selected.value = '3'
    history.undo()
    expect(end()).toBeUndefined()
    selected.value = '4'
    expect(end()).toBe(700)
  })

  it('goes back with the row version that is known now, so that it writes over nobody', () => {
    const { works, history, change } = makeDesk()
    change(makeWork(100))
    change(makeWork(100, { rowVersion: 5 }))
    change(makeWork(200, { rowVersion: 5 }))
    history.undo()
    history.undo()
    expect(works.value['3']!.rowVersion).toBe(5)
  })

  it('does not go behind what was saved', () => {
    const { history, change } = makeDesk()
    change(makeWork(100))
    history.forget('3')
    history.undo()
    expect([history.canUndo.value, history.canRedo.value]).toEqual([false, false])
  })
})
