/**
 * Numerical inversion of Laplace transforms that are analytic away from the negative real axis, as those of
 * diffusion are: the trapezoidal rule on a hyperbola that bends round that axis.
 * Source: Weideman & Trefethen 2007, Math. Comp. 76, 1341–1356 (contour and its best parameters); Talbot 1979.
 */

/** Writes the transforms at p = re + i·im as Re, Im, Re, Im, … */
export type LaplaceTransform = (re: number, im: number, out: Float64Array) => void
/** Writes the originals at a time into the first numbers of `out`. */
export type Original = (time: number, out: Float64Array) => void

/** Times that will be asked for. */
export interface TimeSpan {
  from: number
  to: number
}

/** Points of the upper half of a contour for times from 1/span to 1: p, and its weight dp/du·h/π. */
interface Contour {
  re: Float64Array
  im: Float64Array
  weightRe: Float64Array
  weightIm: Float64Array
}

/** Error about 1e-12 of the original's scale at the one time. */
const SINGLE = hyperbola(12, Math.acosh(2 / ((4.4 - Math.PI) * Math.sin(1.1))), 1.1)
/** Further out e^(pt) adds nothing. */
const SPENT = -50
/** Shift up to which the contour is wide enough. */
const FLANK_WIDTH = 4
/** An original on a flank beyond this shift is zero in double precision. */
const LARGEST_SHIFT = 300
/** Times that share a contour lie within this factor of each other where nobody has told which are wanted. */
const SPAN = 10
/** Error of the wider contours, relative to the original's scale: e^-27.6 = 1e-12 (1e-9 for one that grows with time). */
const SHARED_EXPONENT = 27.6
/** A wanted span is widened to a power of this factor, so that few contours are ever made. */
const WIDENING = 4
/** A wanted span wider than this is left to contours of less. */
const WIDEST = 1e8

/**
 * Originals of `count` transforms at one time.
 * @param shift moves the contour by shift/time to the right. With a transform that falls as e^(-a√p) the shift a²/(4t)
 * keeps the error relative to the original, however small that is; 0 elsewhere.
 */
export function laplaceInverse(
  transform: LaplaceTransform,
  count: number,
  time: number,
  out: Float64Array,
  shift = 0,
): void {
  out.fill(0, 0, count)
  if (shift > LARGEST_SHIFT) return
  const values = scratch(count)
  // Far out on such a flank the transform times e^(pt) is a bell of width √shift along the contour.
  const wider = Math.max(1, Math.sqrt(shift / FLANK_WIDTH))
  for (let j = 0; j < SINGLE.re.length; j++) {
    const re = wider * (SINGLE.re[j] as number) + shift
    const im = wider * (SINGLE.im[j] as number)
    transform(re / time, im / time, values)
    const size = (wider * Math.exp(re)) / time
    turn(SINGLE, j, size * Math.cos(im), size * Math.sin(im))
    for (let k = 0; k < count; k++) {
      const real = values[2 * k] as number
      out[k] = (out[k] as number) + real * turned.im + (values[2 * k + 1] as number) * turned.re
    }
  }
}

export interface InverterOptions {
  /**
   * The a²/4 of transforms that fall as e^(-a√p): on the flank of their originals, before half of it, each time is
   * inverted alone, with the shift that keeps the error relative.
   */
  front?: number
  /** The times that will be asked for, if known: one contour then serves them all. */
  span?: TimeSpan | null | undefined
}

/**
 * Originals of `count` transforms for many times, which share their values of the transform, so that a further time
 * costs microseconds.
 */
export function laplaceInverter(
  transform: LaplaceTransform,
  count: number,
  { front = 0, span }: InverterOptions = {},
): Original {
  const wanted = span ? wantedBlock({ from: Math.max(span.from, front / 2), to: span.to }) : null
  const blocks = new Map<number, Block>()
  return (time, out) => {
    if (time < front / 2) return laplaceInverse(transform, count, time, out, front / time)
    const { index, contour, end } = wanted && time >= wanted.from && time <= wanted.end ? wanted : blockAt(time)
    let values = blocks.get(index)
    if (!values) {
      values = weighted(transform, count, contour, end)
      blocks.set(index, values)
    }
    sum(contour, values, count, time / end, out)
  }
}

/** Values of the transforms times their weights; per point `count` complex numbers. */
type Block = Float64Array

/** A contour for times up to `end`. */
interface Range {
  index: number
  contour: Contour
  from: number
  end: number
}

function wantedBlock({ from, to }: TimeSpan): Range | null {
  if (!(from > 0 && to >= from && to / from <= WIDEST)) return null
  const power = Math.ceil(Math.log(to / from) / Math.log(WIDENING))
  return { index: Number.NaN, contour: contourOf(WIDENING ** power), from, end: to }
}

function blockAt(time: number): Range {
  const index = Math.ceil(Math.log(time) / Math.log(SPAN))
  return { index, contour: contourOf(SPAN), from: 0, end: SPAN ** index }
}

function weighted(transform: LaplaceTransform, count: number, contour: Contour, end: number): Block {
  const points = contour.re.length
  const block = new Float64Array(2 * count * points)
  const values = scratch(count)
  for (let j = 0; j < points; j++) {
    transform((contour.re[j] as number) / end, (contour.im[j] as number) / end, values)
    turn(contour, j, 1 / end, 0)
    for (let k = 0; k < count; k++) {
      const [real, imaginary] = [values[2 * k] as number, values[2 * k + 1] as number]
      block[2 * (j * count + k)] = real * turned.re - imaginary * turned.im
      block[2 * (j * count + k) + 1] = real * turned.im + imaginary * turned.re
    }
  }
  return block
}

/** Σ Im(e^(p·t)·block) over the points. */
function sum({ re, im }: Contour, block: Block, count: number, time: number, out: Float64Array): void {
  out.fill(0, 0, count)
  for (let j = 0; j < re.length; j++) {
    const exponent = (re[j] as number) * time
    if (exponent < SPENT) break
    const size = Math.exp(exponent)
    const angle = (im[j] as number) * time
    const [real, imaginary] = [size * Math.cos(angle), size * Math.sin(angle)]
    for (let k = 0; k < count; k++) {
      const at = 2 * (j * count + k)
      out[k] = (out[k] as number) + real * (block[at + 1] as number) + imaginary * (block[at] as number)
    }
  }
}

/** Weight of a point times a complex number, left here so that nothing is allocated in the loops above. */
const turned = { re: 0, im: 0 }

function turn({ weightRe, weightIm }: Contour, j: number, re: number, im: number): void {
  const [real, imaginary] = [weightRe[j] as number, weightIm[j] as number]
  turned.re = real * re - imaginary * im
  turned.im = real * im + imaginary * re
}

/** Values of a transform are taken one after another, never one inside another's evaluation. */
const buffers = new Map<number, Float64Array>()

function scratch(count: number): Float64Array {
  const buffer = buffers.get(count) ?? new Float64Array(2 * count)
  buffers.set(count, buffer)
  return buffer
}

const contours = new Map<number, Contour>()

/** The contour of fewest points for times from 1/span to 1. */
function contourOf(span: number): Contour {
  const known = contours.get(span)
  if (known) return known
  const alpha = bestAlpha(span)
  const made = hyperbola(Math.ceil(SHARED_EXPONENT / convergence(alpha, span)), strip(alpha, span), alpha)
  contours.set(span, made)
  return made
}

/** Between the bounds of α, π/4 and π/2, in steps that matter to no digit of the convergence. */
function bestAlpha(span: number): number {
  const tried = Array.from({ length: 60 }, (_, k) => 0.8 + 0.01 * k)
  return tried.reduce((best, alpha) => (convergence(alpha, span) > convergence(best, span) ? alpha : best))
}

/** The B of the error e^(−B·points). Source: Weideman & Trefethen 2007, section 4. */
const convergence = (alpha: number, span: number) => (Math.PI ** 2 - 2 * Math.PI * alpha) / strip(alpha, span)

/** Width of the strip in u that is walked: where truncation and the two edges of the strip err alike. Source: ibid. */
function strip(alpha: number, span: number): number {
  return Math.acosh(((Math.PI - 2 * alpha) * span + 4 * alpha - Math.PI) / ((4 * alpha - Math.PI) * Math.sin(alpha)))
}

/** p = μ(1 + sin(iu − α)) at u = (j + ½)h, with the step and the μ that belong to a width of the strip. Source: ibid. */
function hyperbola(points: number, width: number, alpha: number): Contour {
  const step = width / points
  const size = ((4 * Math.PI * alpha - Math.PI ** 2) / width) * points
  const at = (value: (u: number) => number) => Float64Array.from({ length: points }, (_, j) => value((j + 0.5) * step))
  const [sine, cosine] = [size * Math.sin(alpha), size * Math.cos(alpha)]
  return {
    re: at((u) => size - sine * Math.cosh(u)),
    im: at((u) => cosine * Math.sinh(u)),
    weightRe: at((u) => (-sine * Math.sinh(u) * step) / Math.PI),
    weightIm: at((u) => (cosine * Math.cosh(u) * step) / Math.PI),
  }
}
