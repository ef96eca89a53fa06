import { afterEach, describe, expect, it } from 'vitest'
import { work, type Work } from '../../../../src/components/analyses/kept-work.ts'
import { keepWorks, readWorks } from '../../../../src/components/workbench/kept-works.ts'

afterEach(() => sessionStorage.clear())

const makeWork = (overrides: Partial<Work> = {}): Work => ({
  method: 'theis',
  options: { wellIds: ['4'], window: { from_s: 60, to_s: 6_000 } },
  label: null,
  rowVersion: null,
  ...overrides,
})

const seat = { personId: 1, testId: 7 }

describe('Unsaved work of a test', () => {
  it('is there after a reload, and belongs to its test', () => {
    keepWorks(seat, { new: makeWork(), '12': makeWork({ rowVersion: 3 }) })
    expect(readWorks(seat, work)).toEqual({ new: makeWork(), '12': makeWork({ rowVersion: 3 }) })
    expect(readWorks({ ...seat, testId: 8 }, work)).toEqual({})
  })

  it('is not given to the next person who signs in in this window', () => {
    keepWorks(seat, { new: makeWork() })
    expect(readWorks({ ...seat, personId: 2 }, work)).toEqual({})
  })

  it('leaves nothing behind once all is saved', () => {
    keepWorks(seat, { new: makeWork() })
    keepWorks(seat, {})
    expect(sessionStorage.length).toBe(0)
  })

  it('is forgotten when it is no work of this version of the program', () => {
    sessionStorage.setItem('basinbook:workbench:1:7', '{"version":1,"works":{"new":{"method":"unheard-of"}}}')
    expect(readWorks(seat, work)).toEqual({})
    sessionStorage.setItem('basinbook:workbench:1:7', '{broken')
    expect(readWorks(seat, work)).toEqual({})
  })
})
