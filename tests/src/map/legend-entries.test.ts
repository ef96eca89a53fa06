import { describe, expect, it } from 'vitest'
import { legendEntries } from '../../../src/components/map/legend-entries.ts'
import { makeAquiferUnit, makeBoundary, makeCluster, makeMapWell, makeOnMap, makeStream } from './make.ts'

const names = (...given: Parameters<typeof legendEntries>) => legendEntries(...given).map(({ name }) => name)

describe('the legend', () => {
  it('is empty over an empty map', () => {
    expect(legendEntries(makeOnMap(), null)).toEqual([])
  })

  it('names the evidence that is in view, and no other', () => {
    const wells = [makeMapWell({ value: 1e-3, evidence: 'slight' }), makeMapWell()]
    expect(names(makeOnMap({ wells }), null)).toEqual(['slight', 'no value yet'])
  })

  it('names lines and each kind of boundary once', () => {
    const boundaries = [makeBoundary(), makeBoundary({ id: 2 }), makeBoundary({ id: 3, kind: 'constant-head' })]
    const visible = makeOnMap({ streams: [makeStream()], units: [makeAquiferUnit()], boundaries })
    expect(names(visible, null)).toEqual(['stream', 'unit outline', 'fault', 'constant head'])
  })

  it('keeps all evidence to choose from while a filter hides some', () => {
    const wells = [makeMapWell({ value: 1e-3, evidence: 'firm' })]
    const filter = { kind: 'only', only: 'firm' } as const
    expect(names(makeOnMap({ wells }), filter)).toEqual(['firm', 'fair', 'slight', 'no value yet'])
  })

  it('stays while a filter leaves nothing, so that it can be undone', () => {
    expect(names(makeOnMap(), { kind: 'class', index: 0 })).toContain('firm')
  })

  it('explains groups and single wells together', () => {
    const visible = makeOnMap({ clusters: [makeCluster()], wells: [makeMapWell({ kind: 'planned' })] })
    expect(names(visible, null)).toEqual(['no value yet', 'planned', 'wells, arc: with a value', 'without a value'])
  })
})

describe('what an open sheet draws', () => {
  const place = { lon: -21.2, lat: -38.4 }
  const named = (marks: Parameters<typeof legendEntries>[2]) => names(makeOnMap(), null, marks)

  it('is in the legend while it is on the map', () => {
    expect(named({ place, contributions: [] })).toEqual(['this place'])
    expect(named({ place, contributions: [{ ...place, weight: 1 }], radius: true })).toEqual([
      'this place',
      'carried the estimate, wider: more',
      'radius of tests nearby',
    ])
    expect(named({ place: null, contributions: [] })).toEqual([])
  })

  it('cannot be switched off there', () => {
    const [entry] = legendEntries(makeOnMap(), null, { place, contributions: [] })
    expect(entry).toMatchObject({ filter: null, layer: null })
  })
})
