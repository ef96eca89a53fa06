import type { Axis } from './axis.ts'
import type { XY } from './plot-wells.ts'

/** A measured point with what the model says there. */
export interface SimplePoint {
  x: number
  y: number
  fitted: number | null
  state: 'used' | 'outside' | 'left-out'
  /** Whose it is, where points have names of their own. */
  name?: string
}

/** Points that belong together: a repeat, the steps of a test. */
export interface SimpleDots {
  label: string
  points: SimplePoint[]
  /** How many readings the points were chosen from. */
  of: number
}

/** A part of the plot that is tinted, across the other axis. */
export interface SimpleShade {
  axis: 'x' | 'y'
  from: number
  to: number
  label: string
}

/** A plot of a few dots and lines, in the reader's units. */
export interface SimplePlot {
  x: Axis
  y: Axis
  dots: SimpleDots[]
  lines: { label: string; points: XY[] }[]
  shades: SimpleShade[]
  /** Abscissas at which something began, as upright lines. */
  moments: number[]
}

/** More points than a screen can show apart only cost time. */
const MOST_POINTS = 1200

/** Every so many points, so that a long log is drawn at once; all of a short one. */
export function thinnedForScreen<Point>(points: Point[]): Point[] {
  const stride = Math.ceil(points.length / MOST_POINTS)
  return stride <= 1 ? points : points.filter((_, i) => i % stride === 0)
}

const CURVE_POINTS = 200

/** Evenly spaced values from one to another. */
export const evenly = (from: number, to: number, count = CURVE_POINTS): number[] =>
  Array.from({ length: count + 1 }, (_, i) => from + ((to - from) * i) / count)
