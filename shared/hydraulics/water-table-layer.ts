import { decay, meanDecay, meanOf, series, times } from '#shared/numerics/exponential-means.ts'

/**
 * A layer of unit thickness with a tight base at z = 0 and a free water table at z = 1 that yields water as it falls:
 * the response at height z to a source at height z' after transforms over time (p) and radius (x). With
 * η² = x² + κ it solves G'' − η²G = −δ(z − z'), G'(0) = 0, G'(1) = −gG(1):
 *   G = cosh(ηz<)·ψ(z>)/(η·sinh η + g·cosh η), ψ(z) = cosh η(1 − z) + (g/η)·sinh η(1 − z).
 * Everything is written in decaying exponentials, and their small differences as series, so that neither large nor
 * small η loses figures. Inner loops run here: complex numbers are written out, and nothing is allocated.
 * Source: Neuman 1974, whose boundary conditions these are.
 */

/** Heights above the base as shares of the thickness, low ≤ high; alike for a point. */
export interface OpenInterval {
  low: number
  high: number
}

/**
 * Writes, for given η and g, a mean over source and place of observation and its derivative by ln g, each as Re and Im.
 */
export type LayerMean = (etaRe: number, etaIm: number, gRe: number, gIm: number, out: Float64Array) => void

/** Means of exponentials of arguments below this are summed as series. */
const SERIES_BELOW = 0.1

/** Scratch for complex numbers, each as Re and Im at an even index. */
const work = new Float64Array(18)
const [STIFF, INVERSE, E1, E2, E3, E4, SUM, TOP, MEAN] = [0, 2, 4, 6, 8, 10, 12, 14, 16]

/**
 * g·cosh(ηz)/(η·sinh η + g·cosh η) averaged over the place: the share of the response 1/η² of a confined layer, with a
 * source over the whole thickness, that the water table takes off.
 */
export function waterTableShare(place: OpenInterval): LayerMean {
  return (etaRe, etaIm, gRe, gIm, out) => {
    denominator(etaRe, etaIm, gRe, gIm)
    atTop(etaRe, etaIm, place, TOP)
    times(work, TOP, gRe, gIm)
    write(TOP, out, 0)
    times(work, TOP, work[STIFF] as number, work[STIFF + 1] as number)
    times(work, TOP, work[INVERSE] as number, work[INVERSE + 1] as number)
    write(TOP, out, 2)
  }
}

interface Part {
  weight: number
  source: OpenInterval
  place: OpenInterval
}

/** Mean of G for a source and a place of observation over any intervals. */
export function layerMean(source: OpenInterval, place: OpenInterval): LayerMean {
  const parts = partsOf(source, place)
  return (etaRe, etaIm, gRe, gIm, out) => {
    denominator(etaRe, etaIm, gRe, gIm)
    work[SUM] = 0
    work[SUM + 1] = 0
    for (const { weight, source: one, place: other } of parts) {
      if (one.low === other.low && one.high === other.high) alike(etaRe, etaIm, gRe, gIm, one.low, one.high)
      else if (one.high <= other.low) apart(etaRe, etaIm, gRe, gIm, one, other)
      else apart(etaRe, etaIm, gRe, gIm, other, one)
      work[SUM] = (work[SUM] as number) + weight * (work[TOP] as number)
      work[SUM + 1] = (work[SUM + 1] as number) + weight * (work[TOP + 1] as number)
    }
    times(work, SUM, work[INVERSE] as number, work[INVERSE + 1] as number)
    write(SUM, out, 0)
    // A stiffer table takes off −g·G(z, 1)·G(1, z').
    atTop(etaRe, etaIm, source, TOP)
    atTop(etaRe, etaIm, place, SUM)
    times(work, TOP, work[SUM] as number, work[SUM + 1] as number)
    times(work, TOP, -gRe, -gIm)
    write(TOP, out, 2)
  }
}

/** Cuts both intervals at all ends, so that any two pieces are either the same or one above the other. */
function partsOf(source: OpenInterval, place: OpenInterval): Part[] {
  const ends = [source.low, source.high, place.low, place.high].sort((a, b) => a - b)
  return piecesOf(source, ends).flatMap((one) =>
    piecesOf(place, ends).map((other) => ({
      weight: shareOf(one, source) * shareOf(other, place),
      source: one,
      place: other,
    })),
  )
}

function piecesOf(interval: OpenInterval, ends: number[]): OpenInterval[] {
  if (interval.low === interval.high) return [interval]
  const inside = ends.filter((end) => end >= interval.low && end <= interval.high)
  return inside.slice(1).flatMap((high, i) => {
    const low = inside[i] as number
    return high > low ? [{ low, high }] : []
  })
}

const shareOf = (piece: OpenInterval, whole: OpenInterval) =>
  whole.high > whole.low ? (piece.high - piece.low) / (whole.high - whole.low) : 1

/** Mean of 2·cosh(ηz)·ψ(z') over one interval below another, times e^-η, into TOP. */
function apart(etaRe: number, etaIm: number, gRe: number, gIm: number, below: OpenInterval, above: OpenInterval): void {
  // cosh(ηm)·[sinh ηh]/ηh below; (cosh + (g/η)·sinh)(η(1 − m))·[sinh ηh]/ηh above.
  decay(work, etaRe, etaIm, above.low - below.high, TOP)
  decay(work, etaRe, etaIm, below.low + below.high, E1)
  times(work, TOP, 1 + (work[E1] as number), work[E1 + 1] as number)
  timesMeanDecay(TOP, etaRe, etaIm, below.high - below.low)
  timesMeanDecay(TOP, etaRe, etaIm, above.high - above.low)
  const rest = 2 - above.low - above.high
  decay(work, etaRe, etaIm, rest, E1)
  meanOf(work, rest * etaRe, rest * etaIm, E1, E2)
  times(work, E2, (rest * gRe) / 2, (rest * gIm) / 2)
  // ½(1 + e^-2w) + g·(1 − m)·(1 − e^-2w)/(2w), of which TOP holds the factor ½·2.
  times(
    work,
    TOP,
    (1 + (work[E1] as number)) / 2 + (work[E2] as number),
    (work[E1 + 1] as number) / 2 + (work[E2 + 1] as number),
  )
}

/** The same over one interval twice, where z and z' take turns in being the lower. */
function alike(etaRe: number, etaIm: number, gRe: number, gIm: number, low: number, high: number): void {
  const length = high - low
  const [vRe, vIm] = [length * etaRe, length * etaIm]
  meanDecay(work, vRe, vIm, E1)
  times(work, E1, work[E1] as number, work[E1 + 1] as number)
  decay(work, etaRe, etaIm, 2 * low, E2)
  decay(work, etaRe, etaIm, 2 * (1 - high), E3)
  const [lowRe, lowIm, highRe, highIm] = [
    work[E2] as number,
    work[E2 + 1] as number,
    work[E3] as number,
    work[E3 + 1] as number,
  ]
  const [squareRe, squareIm] = [work[E1] as number, work[E1 + 1] as number]
  secondMeans(vRe, vIm)
  decay(work, etaRe, etaIm, 2 - length, E1)
  times(work, E3, work[E1] as number, work[E1 + 1] as number)
  // D + e^(−η(2−ℓ))·U + (e^(−2η·low) + e^(−2η(1−high)))·a², and with minus signs for the part of g/η.
  const [plusRe, plusIm] = [lowRe + highRe, lowIm + highIm]
  const [minusRe, minusIm] = [lowRe - highRe, lowIm - highIm]
  work[TOP] = (work[E2] as number) - (work[E3] as number) + minusRe * squareRe - minusIm * squareIm
  work[TOP + 1] = (work[E2 + 1] as number) - (work[E3 + 1] as number) + minusRe * squareIm + minusIm * squareRe
  const size = etaRe * etaRe + etaIm * etaIm
  times(work, TOP, (gRe * etaRe + gIm * etaIm) / size, (gIm * etaRe - gRe * etaIm) / size)
  work[TOP] =
    ((work[TOP] as number) + (work[E2] as number) + (work[E3] as number) + plusRe * squareRe - plusIm * squareIm) / 2
  work[TOP + 1] =
    ((work[TOP + 1] as number) +
      (work[E2 + 1] as number) +
      (work[E3 + 1] as number) +
      plusRe * squareIm +
      plusIm * squareRe) /
    2
}

/**
 * 1/(η(1 − q) + g(1 + q)) with q = e^-2η, that is e^η/2 over η·sinh η + g·cosh η, into INVERSE; (1 − q)/η into MEAN and
 * η(1 − q) into STIFF.
 */
function denominator(etaRe: number, etaIm: number, gRe: number, gIm: number): void {
  // (1 − q)/η is twice a mean that keeps its figures where η is small.
  decay(work, etaRe, etaIm, 2, E1)
  meanOf(work, 2 * etaRe, 2 * etaIm, E1, MEAN)
  work[MEAN] = 2 * (work[MEAN] as number)
  work[MEAN + 1] = 2 * (work[MEAN + 1] as number)
  work[STIFF] = work[MEAN] as number
  work[STIFF + 1] = work[MEAN + 1] as number
  times(work, STIFF, etaRe * etaRe - etaIm * etaIm, 2 * etaRe * etaIm)
  const [qRe, qIm] = [work[E1] as number, work[E1 + 1] as number]
  const re = (work[STIFF] as number) + gRe * (1 + qRe) - gIm * qIm
  const im = (work[STIFF + 1] as number) + gIm * (1 + qRe) + gRe * qIm
  const size = re * re + im * im
  work[INVERSE] = re / size
  work[INVERSE + 1] = -im / size
}

/**
 * Mean of cosh(ηz)/(η·sinh η + g·cosh η) over an interval, G with one end at the water table; needs INVERSE and MEAN.
 */
function atTop(etaRe: number, etaIm: number, { low, high }: OpenInterval, at: number): void {
  if (low === 0 && high === 1) {
    work[at] = work[MEAN] as number
    work[at + 1] = work[MEAN + 1] as number
  } else {
    decay(work, etaRe, etaIm, 1 - high, at)
    decay(work, etaRe, etaIm, low + high, E1)
    times(work, at, 1 + (work[E1] as number), work[E1 + 1] as number)
    timesMeanDecay(at, etaRe, etaIm, high - low)
  }
  times(work, at, work[INVERSE] as number, work[INVERSE + 1] as number)
}

function write(from: number, out: Float64Array, to: number): void {
  out[to] = work[from] as number
  out[to + 1] = work[from + 1] as number
}

/** D = 2(e^-v − 1 + v)/v² into E2 and U = 2(1 − (1 + v)e^-v)/v² into E3. */
function secondMeans(vRe: number, vIm: number): void {
  const size = vRe * vRe + vIm * vIm
  if (size < SERIES_BELOW * SERIES_BELOW) {
    series(work, vRe, vIm, 2, 0, E2)
    return series(work, vRe, vIm, 2, 1, E3)
  }
  decay(work, vRe, vIm, 1, E4)
  const [decayRe, decayIm] = [work[E4] as number, work[E4 + 1] as number]
  const [inverseRe, inverseIm] = [(2 * (vRe * vRe - vIm * vIm)) / (size * size), (-4 * vRe * vIm) / (size * size)]
  work[E2] = decayRe - 1 + vRe
  work[E2 + 1] = decayIm + vIm
  work[E3] = 1 - (1 + vRe) * decayRe + vIm * decayIm
  work[E3 + 1] = -(1 + vRe) * decayIm - vIm * decayRe
  times(work, E2, inverseRe, inverseIm)
  times(work, E3, inverseRe, inverseIm)
}

/** Multiplies by the mean of e^-u from 0 to η times a length, which is 1 for a point. */
function timesMeanDecay(at: number, etaRe: number, etaIm: number, length: number): void {
  if (length === 0) return
  meanDecay(work, length * etaRe, length * etaIm, E1)
  times(work, at, work[E1] as number, work[E1 + 1] as number)
}
