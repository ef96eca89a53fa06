import { describe, expect, it } from 'vitest'
import { useMapChoice } from '../../../src/stores/map.ts'
import { runWith } from '../support/mount.ts'
import { makeAquiferUnit } from './make.ts'

const poor = makeAquiferUnit({ id: 1, valueCounts: { T: 2, S: 9, K: 9 } })
const rich = makeAquiferUnit({ id: 2, valueCounts: { T: 30, S: 0, K: 0 } })

describe('the choice of what the map shows', () => {
  it('begins with the unit that has most values of transmissivity', () => {
    const choice = runWith(useMapChoice)
    expect(choice.unitId).toBeUndefined()
    choice.settleUnit([poor, rich])
    expect(choice.unitId).toBe(2)
  })

  it('keeps what was chosen, also that there is no unit, and replaces a unit that is gone', () => {
    const choice = runWith(useMapChoice)
    choice.chooseUnit(1)
    choice.settleUnit([poor, rich])
    expect(choice.unitId).toBe(1)
    choice.settleUnit([rich])
    expect(choice.unitId).toBe(2)
    choice.chooseUnit(null)
    choice.settleUnit([poor, rich])
    expect(choice.unitId).toBeNull()
  })

  it('is without a unit in a region that has none', () => {
    const choice = runWith(useMapChoice)
    choice.settleUnit([])
    expect(choice.unitId).toBeNull()
  })

  it('asks for storage by its class', () => {
    const choice = runWith(useMapChoice)
    choice.chooseParameter('Sy')
    expect(choice.askedValues).toEqual({ quantity: 'S', storageClass: 'specific-yield' })
    choice.chooseParameter('S')
    expect(choice.askedValues).toEqual({ quantity: 'S', storageClass: 'elastic' })
  })
})
