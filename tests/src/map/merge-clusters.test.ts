import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { mergeClusters, type PlacedCluster } from '../../../src/components/map/merge-clusters.ts'
import { clusterRadius } from '../../../src/components/map/well-symbols.ts'

const makePlaced = (overrides: Partial<PlacedCluster> = {}): PlacedCluster => ({
  lon: 0,
  lat: 0,
  x: 0,
  y: 0,
  count: 10,
  valued: 5,
  ...overrides,
})

const anyClusters = fc.array(
  fc.record({
    x: fc.integer({ min: 0, max: 600 }),
    y: fc.integer({ min: 0, max: 600 }),
    count: fc.integer({ min: 2, max: 5_000 }),
  }),
  { maxLength: 40 },
)
const placed = (list: { x: number; y: number; count: number }[]) =>
  list.map((cluster) =>
    makePlaced({ ...cluster, lon: cluster.x, lat: cluster.y, valued: Math.floor(cluster.count / 3) }),
  )
const total = (list: PlacedCluster[], key: 'count' | 'valued') => list.reduce((sum, cluster) => sum + cluster[key], 0)

describe('merging clusters', () => {
  it('joins two whose rings overlap, at the mean place of their wells', () => {
    const merged = mergeClusters([
      makePlaced({ count: 30, lon: 1 }),
      makePlaced({ x: 10, lon: 2, count: 10, valued: 1 }),
    ])
    expect(merged).toEqual([{ lon: 1.25, lat: 0, x: 2.5, y: 0, count: 40, valued: 6 }])
  })

  it('leaves those alone that do not touch', () => {
    expect(mergeClusters([makePlaced(), makePlaced({ x: 100 })])).toHaveLength(2)
  })

  it('loses no well', () => {
    fc.assert(
      fc.property(anyClusters, (list) => {
        const before = placed(list)
        const after = mergeClusters(before)
        expect(total(after, 'count')).toBe(total(before, 'count'))
        expect(total(after, 'valued')).toBe(total(before, 'valued'))
      }),
    )
  })

  it('leaves no two rings that overlap', () => {
    fc.assert(
      fc.property(anyClusters, (list) => {
        const after = mergeClusters(placed(list))
        for (const [i, a] of after.entries())
          for (const b of after.slice(i + 1))
            expect(Math.hypot(a.x - b.x, a.y - b.y)).toBeGreaterThanOrEqual(
              clusterRadius(a.count) + clusterRadius(b.count),
            )
      }),
    )
  })
})
