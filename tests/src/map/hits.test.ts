import { describe, expect, it } from 'vitest'
import { hitAt, type HitTargets } from '../../../src/components/map/hits.ts'
import { makeAquiferUnit, makeBoundary, makeCluster, makeMapWell, makeOnMap, makeStream } from './make.ts'

/** A hundred pixels a degree, from the north-west corner of the island's surroundings. */
const project = (lon: number, lat: number) => [(lon + 22) * 1000, (-38 - lat) * 1000] as const
const at = (targets: Partial<HitTargets>, lon: number, lat: number, pointer: 'mouse' | 'touch' = 'mouse') =>
  hitAt(makeOnMap(targets), project(lon, lat), project, { zoom: 11, pointer })

describe('what lies under the pointer', () => {
  it('is the nearest well', () => {
    const near = makeMapWell({ lon: -21.2 })
    const far = makeMapWell({ lon: -21.205 })
    expect(at({ wells: [far, near] }, -21.2005, -38.4)).toEqual({ kind: 'well', well: near })
  })

  it('is the disc with a value where it covers a hollow ring', () => {
    const hollow = makeMapWell()
    const disc = makeMapWell({ lon: -21.198, value: 1e-3, evidence: 'fair' })
    expect(at({ wells: [hollow, disc] }, -21.1993, -38.4)).toEqual({ kind: 'well', well: disc })
  })

  it('is a well before the line beneath it, and a line before an outline', () => {
    const well = makeMapWell()
    const stream = makeStream({
      path: [
        [-21.4, -38.4],
        [-21, -38.4],
      ],
    })
    const unit = makeAquiferUnit({
      outline: [
        [
          [-21.4, -38.4],
          [-21, -38.4],
        ],
      ],
    })
    expect(at({ wells: [well], streams: [stream] }, -21.2, -38.4)?.kind).toBe('well')
    expect(at({ streams: [stream], units: [unit] }, -21.2, -38.4)?.kind).toBe('stream')
    expect(at({ units: [unit] }, -21.2, -38.4)?.kind).toBe('unit')
  })

  it('reaches further for a finger', () => {
    const wells = [makeMapWell()]
    expect(at({ wells }, -21.188, -38.4)).toBeNull()
    expect(at({ wells }, -21.188, -38.4, 'touch')?.kind).toBe('well')
  })

  it('is a cluster inside its ring, and a mapped boundary on its line', () => {
    expect(at({ clusters: [makeCluster()] }, -21.19, -38.4)?.kind).toBe('cluster')
    const boundaries = [
      makeBoundary({
        path: [
          [-21.1, -38.2],
          [-21.1, -38.6],
        ],
      }),
    ]
    expect(at({ boundaries }, -21.103, -38.4)?.kind).toBe('boundary')
  })

  it('is nothing inside a unit, where a click asks for an estimate', () => {
    expect(at({ units: [makeAquiferUnit()] }, -21.2, -38.4)).toBeNull()
  })
})
