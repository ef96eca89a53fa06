import { describe, expect, it } from 'vitest'
import { directionText } from '#shared/words/directions.ts'

describe('A direction', () => {
  it('reads as compass words', () => {
    expect([0, 45, 200, 292.5, 359].map(directionText)).toEqual([
      'north',
      'north-east',
      'south-south-west',
      'west-north-west',
      'north',
    ])
  })
})
