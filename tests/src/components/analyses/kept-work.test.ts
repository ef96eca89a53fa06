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

const desk = { personId: 1, testId: 7 }

describe('Unsaved work of a test', () => {
  it('is there after a reload, and belongs to its test', () => {
    keepWork(desk, { new: makeWork(), '12': makeWork({ rowVersion: 3 }) })
    expect(readWork(desk)).toEqual({ new: makeWork(), '12': makeWork({ rowVersion: 3 }) })
    expect(readWork({ ...desk, testId: 8 })).toEqual({})
  })

  it('is not given to the next person who signs in in this window', () => {
    keepWork(desk, { new: makeWork() })
    expect(readWork({ ...desk, personId: 2 })).toEqual({})
  })

  it('leaves nothing behind once all is saved', () => {
    keepWork(desk, { new: makeWork() })
    keepWork(desk, {})
    expect(sessionStorage.length).toBe(0)
  })

  it('is forgotten when it is no work of this version of the program', () => {
    sessionStorage.setItem('basinbook:workbench:1:7', '{"version":1,"works":{"new":{"method":"unheard-of"}}}')
    expect(readWork(desk)).toEqual({})
    sessionStorage.setItem('basinbook:workbench:1:7', '{broken')
    expect(readWork(desk)).toEqual({})
  })
})
