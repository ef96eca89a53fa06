import { describe, expect, it } from 'vitest'
import { methodIds, methods } from '#shared/hydraulics/catalogue.ts'
import { needsText } from '#shared/words/methods.ts'

describe('What a method needs', () => {
  it('reads as one sentence', () => {
    expect(needsText(methods['cooper-jacob'])).toBe('Needs one well')
    expect(needsText(methods['distance-drawdown'])).toBe('Needs 3 or more observation wells')
    expect(needsText(methods.recovery)).toBe('Needs one well and readings after the stop')
    expect(needsText(methods['large-diameter'])).toBe(
      'Needs one or more wells, the radius of the pumped well and the radius of its casing',
    )
  })

  it('is known of every method', () => {
    for (const id of methodIds) expect(needsText(methods[id])).not.toContain('undefined')
  })
})
