import { describe, expect, it } from 'vitest'
import { methodIds } from '#shared/hydraulics/catalogue.ts'
import { methodGroups } from '../../../../src/components/analyses/method-menu.ts'
import { makeTestInputs } from '../../../shared/charts/make-plot.ts'

const groupsOf = (overrides: Partial<ReturnType<typeof makeTestInputs>>) =>
  methodGroups({ ...makeTestInputs(), ...overrides })

describe('The menu of methods', () => {
  it('offers every method once', () => {
    const offered = groupsOf({}).flatMap(({ methods }) => methods.map(({ id }) => id))
    expect([...offered].sort()).toEqual([...methodIds].sort())
  })

  it('begins with the curves made for the kind of aquifer of the test', () => {
    const first = (aquifer: 'confined' | 'leaky' | 'unconfined') =>
      groupsOf({ aquifer })[0]!.methods.map(({ id }) => id as string)
    expect(first('confined')).toContain('theis')
    expect(first('leaky')).toContain('leaky')
    expect(first('leaky')).not.toContain('theis')
    expect(first('unconfined')).toEqual(['unconfined'])
  })

  it('says of each method that cannot be used why, after those that can', () => {
    const [curves] = groupsOf({})
    expect(curves!.methods.map(({ id, obstacle }) => [id, obstacle?.code ?? null])).toEqual([
      ['theis', null],
      ['partial-penetration', 'analysis/penetration-thickness'],
      ['partial-penetration-isotropic', 'analysis/penetration-thickness'],
      ['large-diameter', 'analysis/no-well-radius'],
      ['large-diameter-skin', 'analysis/no-well-radius'],
    ])
    const recovery = groupsOf({ rates: [{ start_s: 0, rate_m3_s: 0.01 }] }).find(({ title }) => /Recovery/.test(title))
    expect(recovery!.methods.map(({ obstacle }) => obstacle?.code)).toEqual([
      'analysis/no-recovery',
      'analysis/no-recovery',
    ])
  })
})
