/**
 * Numerical inversion of Laplace transforms that are analytic away from the negative real axis, as those of
 * diffusion are: the trapezoidal rule on a hyperbola that bends round that axis.
 * Source: Weideman & Trefethen 2007, Math. Comp. 76, 1341–1356 (contour and its best parameters); Talbot 1979.
 */

/** Writes the transforms at p = re + i·im as Re, Im, Re, Im, … */
export type LaplaceTransform = (re: number, im: number, out: Float64Array) => void
/** Writes the originals at a time into the first numbers of `out`. */
export type Original = (time: number, out: Float64Array) => void

/** Points of the upper half of a contour for times from 1/span to 1: p, and its weight dp/du·h/π. */
interface Contour {
  re: Float64Array
  im: Float64Array
  weightRe: Float64Array
  weightIm: Float64Array
}

/** Error about 1e-12 of the original's scale at the one time. */
const SINGLE = hyperbola(12, 1, 1.1)
/** Shift up to which the contour is wide enough. */
const FLANK_WIDTH = 4
/** An original on a flank beyond this shift is zero in double precision. */
const LARGEST_SHIFT = 300
/** Times that share a contour lie within this factor of each other. */
const SPAN = 4
/** Error about 1e-11 of the original's scale (1e-9 for one that grows with time) at all of them. */
const SHARED = hyperbola(24, SPAN, 1)

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

/**
 * Originals of `count` transforms for many times: those within a factor of four share their values of the transform,
 * so that a further time costs microseconds.
 * @param front the a²/4 of transforms that fall as e^(-a√p): on the flank of their originals, before half of it, each
 * time is inverted alone, with the shift that keeps the error relative
 */
export function laplaceInverter(transform: LaplaceTransform, count: number, front = 0): Original {
  const blocks = new Map<number, Float64Array>()
  return (time, out) => {
    if (time < front / 2) return laplaceInverse(transform, count, time, out, front / time)
    const index = Math.ceil(Math.log(time) / Math.log(SPAN))
    const end = SPAN ** index
    let block = blocks.get(index)
    if (!block) {
      block = weighted(transform, count, end)
      blocks.set(index, block)
    }
    sum(block, count, time / end, out)
  }
}

/** Values of the transforms times their weights, for times up to `end`; per point `count` complex numbers. */
function weighted(transform: LaplaceTransform, count: number, end: number): Float64Array {
  const points = SHARED.re.length
  const block = new Float64Array(2 * count * points)
  const values = scratch(count)
  for (let j = 0; j < points; j++) {
    transform((SHARED.re[j] as number) / end, (SHARED.im[j] as number) / end, values)
    turn(SHARED, j, 1 / end, 0)
    for (let k = 0; k < count; k++) {
      const [real, imaginary] = [values[2 * k] as number, values[2 * k + 1] as number]
      block[2 * (j * count + k)] = real * turned.re - imaginary * turned.im
      block[2 * (j * count + k) + 1] = real * turned.im + imaginary * turned.re
    }
  }
  return block
}

/** Σ Im(e^(p·t)·block) over the points. */
function sum(block: Float64Array, count: number, time: number, out: Float64Array): void {
  out.fill(0, 0, count)
  for (let j = 0; j < SHARED.re.length; j++) {
    const size = Math.exp((SHARED.re[j] as number) * time)
    const angle = (SHARED.im[j] as number) * time
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

/**
 * p = μ(1 + sin(iu − α)) at u = (j + ½)h. Step and μ balance the errors of truncation and of the two edges of the
 * strip in u for all times from 1/span to 1. Source: Weideman & Trefethen 2007, section 4.
 */
function hyperbola(points: number, span: number, alpha: number): Contour {
  const strip = Math.acosh((2 * span) / ((4 * alpha - Math.PI) * Math.sin(alpha)))
  const step = strip / points
  const size = ((4 * Math.PI * alpha - Math.PI ** 2) / strip) * points
  const at = (value: (u: number) => number) => Float64Array.from({ length: points }, (_, j) => value((j + 0.5) * step))
  const [sine, cosine] = [size * Math.sin(alpha), size * Math.cos(alpha)]
  return {
    re: at((u) => size - sine * Math.cosh(u)),
    im: at((u) => cosine * Math.sinh(u)),
    weightRe: at((u) => (-sine * Math.sinh(u) * step) / Math.PI),
    weightIm: at((u) => (cosine * Math.cosh(u) * step) / Math.PI),
  }
}
