import { afterEach, describe, expect, it } from 'vitest'
import { keepWork, readWork, type Work } from '../../../../src/components/analyses/kept-work.ts'

afterEach(() => sessionStorage.clear())

const makeWork = (overrides: Partial<Work> = {}): Work => ({
  method: 'theis',
  options: { wellIds: ['4'], window: { from_s: 60, to_s: 6_000 } },
  label: null,
  rowVersion: null,
  ...overrides,
})

describe('Unsaved work of a test', () => {
  it('is there after a reload, and belongs to its test', () => {
    keepWork(7, { new: makeWork(), '12': makeWork({ rowVersion: 3 }) })
    expect(readWork(7)).toEqual({ new: makeWork(), '12': makeWork({ rowVersion: 3 }) })
    expect(readWork(8)).toEqual({})
  })

  it('leaves nothing behind once all is saved', () => {
    keepWork(7, { new: makeWork() })
    keepWork(7, {})
    expect(sessionStorage.length).toBe(0)
  })

  it('is forgotten when it is no work of this version of the program', () => {
    sessionStorage.setItem('basinbook:workbench:7', '{"version":1,"works":{"new":{"method":"unheard-of"}}}')
    expect(readWork(7)).toEqual({})
    sessionStorage.setItem('basinbook:workbench:7', '{broken')
    expect(readWork(7)).toEqual({})
  })
})
