import type { AquiferUnit, Boundary, MapCluster, MapWell, Stream } from '#shared/contracts/map.ts'
import type { OnMap } from '../../../src/components/map/in-view.ts'

let made = 0

export const makeMapWell = (overrides: Partial<MapWell> = {}): MapWell => {
  made += 1
  return {
    id: made,
    code: `V-${made}`,
    kind: 'well',
    lon: -21.2,
    lat: -38.4,
    value: null,
    evidence: null,
    ...overrides,
  }
}

export const makeCluster = (overrides: Partial<MapCluster> = {}): MapCluster => ({
  lon: -21.2,
  lat: -38.4,
  count: 10,
  valued: 4,
  ...overrides,
})

export const makeStream = (overrides: Partial<Stream> = {}): Stream => ({
  id: 1,
  name: 'Tarrow',
  streamOrder: 1,
  path: [
    [-21.3, -38.35],
    [-21.1, -38.45],
  ],
  ...overrides,
})

export const makeAquiferUnit = (overrides: Partial<AquiferUnit> = {}): AquiferUnit => ({
  id: 1,
  code: 'TG',
  name: 'Tarrow Gravels',
  kind: 'unconfined',
  depthOrder: 1,
  outline: [
    [
      [-21.4, -38.5],
      [-21, -38.5],
      [-21, -38.3],
      [-21.4, -38.3],
      [-21.4, -38.5],
    ],
  ],
  description: null,
  valueCounts: { T: 3, S: 0, K: 0 },
  ...overrides,
})

export const makeBoundary = (overrides: Partial<Boundary> = {}): Boundary => ({
  id: 1,
  name: 'Kelder fault',
  kind: 'fault',
  path: [
    [-21.05, -38.2],
    [-21.1, -38.6],
  ],
  unitIds: [1],
  ...overrides,
})

export const makeOnMap = (overrides: Partial<OnMap> = {}): OnMap => ({
  wells: [],
  clusters: [],
  streams: [],
  units: [],
  boundaries: [],
  ...overrides,
})
