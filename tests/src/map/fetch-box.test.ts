import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fetchBox, type DegreeBox } from '../../../src/components/map/fetch-box.ts'

const home: DegreeBox = [-21.5, -38.6, -20.9, -38.2]

describe('the box of wells to fetch', () => {
  it('holds all that the window shows', () => {
    const window = fc
      .record({
        west: fc.double({ min: -170, max: 150, noNaN: true }),
        south: fc.double({ min: -80, max: 70, noNaN: true }),
        zoom: fc.integer({ min: 6, max: 18 }),
      })
      .map(({ west, south, zoom }) => ({ box: [west, south, west + 300 / 2 ** zoom, south + 200 / 2 ** zoom], zoom }))
    fc.assert(
      fc.property(window, ({ box, zoom }) => {
        const [west, south, east, north] = fetchBox(box as DegreeBox, zoom)
        expect(west).toBeLessThanOrEqual(box[0]!)
        expect(south).toBeLessThanOrEqual(box[1]!)
        expect(east).toBeGreaterThanOrEqual(box[2]!)
        expect(north).toBeGreaterThanOrEqual(box[3]!)
      }),
    )
  })

  it('stays the same for a small move', () => {
    const moved: DegreeBox = [home[0] + 0.001, home[1] + 0.001, home[2] + 0.001, home[3] + 0.001]
    expect(fetchBox(moved, 11)).toEqual(fetchBox(home, 11))
  })

  it('asks for the whole world once when the window shows more than that', () => {
    expect(fetchBox([-260, -70, 250, 80], 2).filter((_, i) => i % 2 === 0)).toEqual([-180, 180])
  })

  it('has its west east of its east across the date line', () => {
    const [west, , east] = fetchBox([179.5, -10, 180.4, -9], 11)
    expect(west).toBeGreaterThan(170)
    expect(east).toBeLessThan(-170)
  })

  it('is the same box for another copy of the world', () => {
    const copy: DegreeBox = [home[0] + 360, home[1], home[2] + 360, home[3]]
    expect(fetchBox(copy, 11)).toEqual(fetchBox(home, 11))
  })

  it('says 180, not −180, where it ends at the date line', () => {
    expect(fetchBox([140, -10, 160, -9], 4)[2]).toBe(180)
  })
})
