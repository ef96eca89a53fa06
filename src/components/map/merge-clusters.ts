import type { MapCluster } from '#shared/contracts/map.ts'
import { clusterRadius } from './well-symbols.ts'

export interface PlacedCluster extends MapCluster {
  /** On the screen, at any origin. */
  x: number
  y: number
}

function joined(a: PlacedCluster, b: PlacedCluster): PlacedCluster {
  const count = a.count + b.count
  const mean = (key: 'x' | 'y' | 'lon' | 'lat') => (a[key] * a.count + b[key] * b.count) / count
  return { x: mean('x'), y: mean('y'), lon: mean('lon'), lat: mean('lat'), count, valued: a.valued + b.valued }
}

const touch = (a: PlacedCluster, b: PlacedCluster) =>
  Math.hypot(a.x - b.x, a.y - b.y) < clusterRadius(a.count) + clusterRadius(b.count) + 2

function mergedOnce(clusters: readonly PlacedCluster[]): PlacedCluster[] {
  const kept: PlacedCluster[] = []
  for (const cluster of [...clusters].sort((a, b) => b.count - a.count)) {
    const at = kept.findIndex((other) => touch(other, cluster))
    if (at < 0) kept.push(cluster)
    else kept[at] = joined(kept[at]!, cluster)
  }
  return kept
}

/**
 * Clusters of neighbouring grid cells whose rings would overlap on the screen become one; none of the answer's overlap.
 * Places are weighted by their wells. Longitudes must be of one copy of the world.
 */
export function mergeClusters(clusters: readonly PlacedCluster[]): PlacedCluster[] {
  const merged = mergedOnce(clusters)
  return merged.length === clusters.length ? merged : mergeClusters(merged)
}
