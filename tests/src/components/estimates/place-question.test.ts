import { describe, expect, it } from 'vitest'
import { placeOf } from '../../../../src/components/estimates/use-place-question.ts'

describe('a place in an address', () => {
  it('is latitude, then longitude', () => {
    expect(placeOf('-38.4172,-21.184')).toEqual({ lat: -38.4172, lon: -21.184 })
    expect(placeOf('0,180')).toEqual({ lat: 0, lon: 180 })
  })

  it.each(['', '1', '1,2,3', 'north,west', '91,0', '0,181', 'NaN,0', ',', '1;2', undefined])('is not %s', (text) => {
    expect(placeOf(text)).toBeNull()
  })
})
