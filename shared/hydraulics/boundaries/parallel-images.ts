/** What an edge does to the sign of a well: +1 for a barrier, −1 for a stream. */
export interface ParallelEdge {
  distance_m: number
  sign: 1 | -1
}

/** Images at equal steps along the common normal, as seen from the pumped well towards the first edge. */
export interface AxisRow {
  /** Of the images first + n·step, n = 0, 1, 2, … */
  first_m: number
  step_m: number
  /** +1 pumps like the real well, −1 injects as much. */
  sign: number
}

/** A place in a row and how many images it stands for. */
export interface RowPoint {
  n: number
  weight: number
}

/** So many images of a row stand for themselves alone; those beyond, for blocks that each double their number. */
const SINGLE = 32
/** The farthest images, 8,192 steps away, act later than any test lasts. */
const BLOCKS = 8
/** Points of a block. */
const POINTS = 16

/**
 * Rows of images of a well between two parallel edges: mirrors in the one edge, in the other, and in both in either
 * order. Signs that take turns make two rows of one.
 * Source: Ferris et al. 1962.
 */
export function parallelRows([one, other]: readonly [ParallelEdge, ParallelEdge]): AxisRow[] {
  const step_m = 2 * (one.distance_m + other.distance_m)
  const both = one.sign * other.sign
  const rows: AxisRow[] = [
    { first_m: 2 * one.distance_m, step_m, sign: one.sign },
    { first_m: -2 * other.distance_m, step_m: -step_m, sign: other.sign },
    { first_m: step_m, step_m, sign: both },
    { first_m: -step_m, step_m: -step_m, sign: both },
  ]
  return both > 0 ? rows : rows.flatMap(takingTurns)
}

const takingTurns = ({ first_m, step_m, sign }: AxisRow): AxisRow[] => [
  { first_m, step_m: 2 * step_m, sign },
  { first_m: first_m + step_m, step_m: 2 * step_m, sign: -sign },
]

let kept: RowPoint[] | null = null

/**
 * Points along any row, nearest first, made once. Where a drawdown changes little from image to image, a few points
 * stand for many: the sum over a block is that of the polynomial through its Chebyshev points, which keeps nine digits
 * (see the tests).
 * Source: Mason & Handscomb 2003, section 6.3 (interpolation at Chebyshev points; from memory).
 */
export function rowPoints(): readonly RowPoint[] {
  kept ??= [
    ...Array.from({ length: SINGLE }, (_, n) => ({ n, weight: 1 })),
    ...Array.from({ length: BLOCKS }, (_, k) => block(SINGLE * 2 ** k).sort((a, b) => a.n - b.n)).flat(),
  ]
  return kept
}

/** Points and weights for the sum over n from `count` to 2·`count` − 1. */
function block(count: number): RowPoint[] {
  const half = (count - 1) / 2
  const angles = Array.from({ length: count }, (_, i) => Math.acos(i / half - 1))
  const sums = Array.from({ length: POINTS }, (_, k) => angles.reduce((sum, angle) => sum + Math.cos(k * angle), 0))
  return Array.from({ length: POINTS }, (_, j) => {
    const angle = (Math.PI * (j + 0.5)) / POINTS
    const weight = sums.reduce((total, sum, k) => total + (k === 0 ? 1 : 2) * Math.cos(k * angle) * sum, 0) / POINTS
    return { n: count + half * (1 + Math.cos(angle)), weight }
  })
}
