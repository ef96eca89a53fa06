import { describe, expect, it } from 'vitest'
import { scaleBar } from '#shared/charts/scale-bar.ts'
import { metresPerPixel } from '../../../src/components/map/metres-per-pixel.ts'

describe('the scale bar', () => {
  it('is a round distance that fits', () => {
    expect(scaleBar(60, 110, 'm')).toEqual({ px: expect.closeTo(83.33, 2), label: '5 km' })
    expect(scaleBar(1.5, 110, 'm')).toEqual({ px: expect.closeTo(66.67, 2), label: '100 m' })
  })

  it('counts in miles and feet for readers who measure in feet', () => {
    expect(scaleBar(60, 110, 'ft').label).toBe('2 mi')
    expect(scaleBar(1.5, 110, 'ft').label).toBe('500 ft')
  })

  it('knows the width of a pixel of the Web Mercator map', () => {
    // 2π × 6 378 137 m / 256 at the equator; half of it at 60°.
    expect(metresPerPixel(0, 0)).toBeCloseTo(156_543.03, 1)
    expect(metresPerPixel(60, 0)).toBeCloseTo(78_271.52, 1)
    expect(metresPerPixel(0, 1)).toBeCloseTo(78_271.52, 1)
  })
})
