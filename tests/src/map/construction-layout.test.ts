import { describe, expect, it } from 'vitest'
import { constructionLayout, type Construction } from '../../../src/components/wells/construction-layout.ts'

const makeConstruction = (overrides: Partial<Construction> = {}): Construction => ({
  depthM: 60,
  staticDepthM: 5,
  measuringPointM: 0.5,
  groundElevationM: 34,
  screens: [{ topM: 30, bottomM: 50, validFrom: null, validTo: null }],
  picks: [{ unitId: 1, unitName: 'Fennick Limestone', topM: 20, bottomM: 55, source: 'log' }],
  ...overrides,
})
const layout = (overrides: Partial<Construction> = {}, lengthUnit = 1) =>
  constructionLayout(makeConstruction(overrides), 280, { lengthUnit, isCurrent: ({ validTo }) => validTo === null })

describe('the section of a well', () => {
  it('draws deeper things further down, to one scale', () => {
    const { y, ground, bottom, screens, bands } = layout()!
    expect(ground).toBe(y(0))
    expect(bottom).toBe(y(60))
    expect((y(30) - y(0)) / (y(60) - y(0))).toBeCloseTo(0.5)
    expect(screens).toEqual([{ top: y(30), bottom: y(50), current: true }])
    expect(bands[0]).toMatchObject({ top: y(20), bottom: y(55) })
  })

  it('counts the static level from the measuring point', () => {
    const { y, waterY } = layout()!
    expect(waterY).toBeCloseTo(y(4.5))
  })

  it('shows the water of a flowing well above ground', () => {
    const { waterY, ground } = layout({ staticDepthM: -2 })!
    expect(waterY).toBeLessThan(ground)
    expect(waterY).toBeGreaterThan(0)
  })

  it('reaches as deep as the deepest thing when the depth is unknown', () => {
    const { y } = layout({ depthM: null })!
    expect(y(55)).toBeCloseTo(280 - 14)
  })

  it('is nothing when nothing is known', () => {
    expect(layout({ depthM: null, staticDepthM: null, screens: [], picks: [] })).toBeNull()
  })

  it('writes no two names of units over each other', () => {
    const picks = Array.from({ length: 6 }, (_, i) => ({
      unitId: i,
      unitName: `Unit ${i}`,
      topM: 20 + i,
      bottomM: 21 + i,
      source: 'log',
    }))
    const places = layout({ picks })!.bands.map(({ labelY }) => labelY)
    for (const [i, place] of places.entries()) if (i > 0) expect(place - places[i - 1]!).toBeGreaterThanOrEqual(15)
    expect(Math.max(...places)).toBeLessThanOrEqual(280)
  })

  it('ends a unit that goes on below the well at its bottom', () => {
    const picks = [{ unitId: 1, unitName: 'Deep', topM: 40, bottomM: null, source: 'log' }]
    const { bands, bottom } = layout({ picks })!
    expect(bands[0]?.bottom).toBe(bottom)
  })

  it.each([1, 0.3048])('has three to twelve round marks in a unit of %s m', (unit) => {
    for (const depthM of [3, 17, 60, 186, 900]) {
      const { ticks } = layout({ depthM, screens: [], picks: [], staticDepthM: null }, unit)!
      expect(ticks.length).toBeGreaterThanOrEqual(3)
      expect(ticks.length).toBeLessThanOrEqual(12)
      const step = Number((ticks[1]!.depthM / unit).toPrecision(9))
      expect([1, 2, 5]).toContain(Number(step.toExponential().split('e')[0]))
    }
  })

  it('tells screens that are no longer open', () => {
    const former = { topM: 10, bottomM: 20, validFrom: null, validTo: '2004-01-01T00:00:00Z' }
    expect(layout({ screens: [former] })!.screens[0]?.current).toBe(false)
  })
})
