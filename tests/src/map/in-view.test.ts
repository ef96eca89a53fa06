import { describe, expect, it } from 'vitest'
import type { DegreeBox } from '../../../src/components/map/fetch-box.ts'
import { inView, wellCount } from '../../../src/components/map/in-view.ts'
import { makeAquiferUnit, makeCluster, makeMapWell, makeOnMap, makeStream } from './make.ts'

const box: DegreeBox = [-21.5, -38.6, -20.9, -38.2]
const window = { box, zoom: 11, center: { lon: -21.2, lat: -38.4 } }

describe('what is in view', () => {
  it('holds the wells inside, in the order of their codes', () => {
    const wells = [makeMapWell({ code: 'V-10' }), makeMapWell({ code: 'V-9' }), makeMapWell({ lon: -22 })]
    expect(inView(makeOnMap({ wells }), window).wells.map(({ code }) => code)).toEqual(['V-9', 'V-10'])
  })

  it('counts the wells inside groups too', () => {
    const visible = inView(makeOnMap({ wells: [makeMapWell()], clusters: [makeCluster({ count: 40 })] }), window)
    expect(wellCount(visible)).toBe(41)
  })

  it('holds a line that only runs across, and none that is elsewhere', () => {
    const across = makeStream({
      path: [
        [-22, -38.4],
        [-20, -38.4],
      ],
    })
    const elsewhere = makeStream({
      id: 2,
      path: [
        [-22, -39],
        [-20, -39.2],
      ],
    })
    expect(inView(makeOnMap({ streams: [across, elsewhere] }), window).streams).toEqual([across])
  })

  it('holds a unit whose outline is larger than the window', () => {
    const unit = makeAquiferUnit({
      outline: [
        [
          [-30, -50],
          [-10, -50],
          [-10, -30],
          [-30, -30],
          [-30, -50],
        ],
      ],
    })
    expect(inView(makeOnMap({ units: [unit] }), window).units).toHaveLength(1)
  })

  it('finds wells in another copy of the world', () => {
    const copy = { ...window, box: [338.5, -38.6, 339.1, -38.2] as DegreeBox, center: { lon: 338.8, lat: -38.4 } }
    expect(inView(makeOnMap({ wells: [makeMapWell()] }), copy).wells).toHaveLength(1)
  })

  it('finds wells on both sides of the date line', () => {
    const date = { ...window, box: [179, -39, 181, -38] as DegreeBox, center: { lon: 180, lat: -38.4 } }
    const wells = [makeMapWell({ lon: 179.5 }), makeMapWell({ lon: -179.5 }), makeMapWell({ lon: 0 })]
    expect(inView(makeOnMap({ wells }), date).wells).toHaveLength(2)
  })
})
