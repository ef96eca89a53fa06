import { describe, expect, it } from 'vitest'
import { destination } from '#shared/geodesy/index.ts'
import { edgeOfBoundary, surroundingsOf, type MapEdge } from '../../../server/api/analyses/surroundings.ts'

const well = { lon: -21.2, lat: -38.4 }
const at = (bearing_deg: number, distance_m: number): [number, number] => {
  const { lon, lat } = destination(well, bearing_deg, distance_m)
  return [lon, lat]
}

/** A straight line across the direction in which it lies. */
const makeEdge = (bearing_deg: number, distance_m: number, overrides: Partial<MapEdge> = {}): MapEdge => {
  const reach = Math.hypot(distance_m, 5000)
  const half = (Math.atan2(5000, distance_m) * 180) / Math.PI
  const path = [at(bearing_deg - half, reach), at(bearing_deg + half, reach)]
  return { kind: 'recharge', name: 'Tarrow', path, ...overrides }
}

describe('What the map knows near a well', () => {
  it('is told with the distance and direction of its nearest point', () => {
    const [one] = surroundingsOf([well.lon, well.lat], [makeEdge(60, 800)])
    expect(one).toMatchObject({ kind: 'recharge', name: 'Tarrow' })
    expect(Math.abs(one!.distance_m / 800 - 1)).toBeLessThan(0.005)
    expect(one!.bearing_deg).toBeCloseTo(60, 0)
  })

  it('is the nearest two of a kind, nearest first', () => {
    const edges = [
      makeEdge(0, 900, { name: 'c' }),
      makeEdge(90, 300, { name: 'a' }),
      makeEdge(180, 600, { name: 'b' }),
      makeEdge(270, 5000, { kind: 'barrier', name: 'd' }),
    ]
    expect(surroundingsOf([well.lon, well.lat], edges).map(({ name }) => name)).toEqual(['a', 'b', 'd'])
  })

  it('is nothing where a line runs through the well', () => {
    const path: [number, number][] = [[well.lon, well.lat], at(90, 500)]
    expect(surroundingsOf([well.lon, well.lat], [{ kind: 'recharge', name: 'Tarrow', path }])).toEqual([])
  })

  it('keeps its level at a coast, and lets no water pass at a fault', () => {
    const kindOf = (kind: 'fault' | 'coast') => edgeOfBoundary({ kind, name: '', path: [] }).kind
    expect([kindOf('fault'), kindOf('coast')]).toEqual(['barrier', 'recharge'])
  })
})
