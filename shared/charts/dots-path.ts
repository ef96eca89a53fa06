import type { symbolOf, XY } from './plot-wells.ts'

type Symbol = ReturnType<typeof symbolOf>

/** Outlines of one symbol about a point, as SVG path data; `r` is half its size. */
const outlines: Record<Symbol, (x: number, y: number, r: number) => string> = {
  circle: (x, y, r) => `M${x - r},${y}a${r},${r} 0 1,0 ${2 * r},0a${r},${r} 0 1,0 ${-2 * r},0Z`,
  diamond: (x, y, r) => `M${x},${y - r}L${x + r},${y}L${x},${y + r}L${x - r},${y}Z`,
  triangle: (x, y, r) => `M${x},${y - r}L${x + r},${y + r}L${x - r},${y + r}Z`,
  rect: (x, y, r) => `M${x - r},${y - r}h${2 * r}v${2 * r}h${-2 * r}Z`,
  arrow: (x, y, r) => `M${x},${y - r}L${x + r},${y + r}L${x},${y + r / 2}L${x - r},${y + r}Z`,
  pin: (x, y, r) => `M${x},${y + r}L${x - r},${y - r}L${x + r},${y - r}Z`,
}

/** A tenth of a pixel is finer than any screen shows. */
const rounded = (pixel: number) => Math.round(pixel * 10) / 10

/** One path with the symbol at every point. */
export const dotsPath = (points: readonly XY[], symbol: Symbol, size: number): string =>
  points.map(([x, y]) => outlines[symbol](rounded(x), rounded(y), size / 2)).join('')
