import type { SiteValue } from './types.ts'

/** Wells closer than this tell nearly the same story (common practice). */
export const SITE_SPACING_M = 500

const cell = (v: number): number => Math.floor(v / SITE_SPACING_M)
/** One number per cell: projected coordinates stay far below the 2.5 million kilometres where two cells could share one. */
const cellKey = (column: number, row: number): number => column * 1e7 + row

/**
 * Values that are each more than 500 m from every other chosen one, the surest first. A grid of 500 m cells keeps it
 * linear in the number of values.
 */
export function independentSites<V extends Pick<SiteValue, 'id' | 'x' | 'y' | 'error'>>(values: readonly V[]): V[] {
  const grid = new Map<number, V[]>()
  const near = (v: V): boolean => {
    for (let dx = -1; dx <= 1; dx++) {
      for (let dy = -1; dy <= 1; dy++) {
        const others = grid.get(cellKey(cell(v.x) + dx, cell(v.y) + dy)) ?? []
        if (others.some((o) => Math.hypot(o.x - v.x, o.y - v.y) <= SITE_SPACING_M)) return true
      }
    }
    return false
  }
  const sorted = [...values].sort((a, b) => a.error - b.error || (a.id < b.id ? -1 : 1))
  return sorted.filter((v) => {
    if (near(v)) return false
    const key = cellKey(cell(v.x), cell(v.y))
    grid.set(key, [...(grid.get(key) ?? []), v])
    return true
  })
}
