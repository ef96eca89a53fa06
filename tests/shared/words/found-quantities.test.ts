import { describe, expect, it } from 'vitest'
import { methodIds, methods } from '#shared/hydraulics/catalogue.ts'
import { foundQuantity } from '#shared/words/found-quantities.ts'

describe('A quantity that an analysis found', () => {
  it('has symbol, name and dimension of the unknown of its method', () => {
    expect(foundQuantity('leaky', 'B', {})).toEqual({ symbol: 'B', name: 'Leakage factor', dimension: 'length' })
    expect(foundQuantity('unconfined', 'anisotropy', {})).toMatchObject({ symbol: 'Kz/Kr', dimension: 'storage' })
  })

  it('is the distance to the stream or barrier that was chosen', () => {
    const boundaries = (['recharge', 'barrier'] as const).map((kind) => ({ kind, distance_m: null, bearing_deg: 0 }))
    expect(foundQuantity('theis', 'boundary_1', { boundaries }).name).toBe('Distance to the stream')
    expect(foundQuantity('theis', 'boundary_2', { boundaries }).name).toBe('Distance to the barrier')
    expect(() => foundQuantity('theis', 'boundary_1', {})).toThrow(RangeError)
  })

  it('is named whatever the method', () => {
    for (const id of methodIds)
      for (const unknown of methods[id].unknowns)
        expect(foundQuantity(id, unknown.id, {}).name.length).toBeGreaterThan(3)
  })
})
