/**
 * Indices of the points that stand for a long series on a screen: the axis is cut into `buckets` of equal width, and each
 * that holds any keeps the one that spans the largest triangle with the point kept before it and the mean of the next
 * bucket, so that peaks and steps stay. First and last are always kept. Abscissas ascend; both are in the coordinates of
 * the screen, so a logarithmic axis gets logarithms.
 * Steinarsson, S. (2013), Downsampling Time Series for Visual Representation, MSc thesis, University of Iceland, section
 * 4.2; there buckets hold equal counts, here equal widths, since readings of a log thin out or crowd along a logarithm.
 */
export function largestTriangles(xs: ArrayLike<number>, ys: ArrayLike<number>, buckets: number): number[] {
  if (!(buckets >= 1)) throw new RangeError(`Cannot cut an axis into ${buckets} buckets`)
  const last = xs.length - 1
  if (last < 2) return Array.from({ length: xs.length }, (_, i) => i)
  const starts = bucketStarts(xs, buckets)
  const kept = [0]
  starts.forEach((from, k) => {
    const to = starts[k + 1] ?? last
    const next = meanOf(xs, ys, to, starts[k + 2] ?? last)
    kept.push(largest({ xs, ys, from, to, before: kept.at(-1) as number, next }))
  })
  return [...kept, last]
}

/** First index of each bucket that holds a point, the first and the last point of all apart. */
function bucketStarts(xs: ArrayLike<number>, buckets: number): number[] {
  const last = xs.length - 1
  const [low, high] = [xs[0] as number, xs[last] as number]
  const perUnit = high > low ? buckets / (high - low) : 0
  const starts: number[] = []
  let open = -1
  for (let i = 1; i < last; i++) {
    const bucket = Math.floor(((xs[i] as number) - low) * perUnit)
    if (bucket > open) starts.push(i)
    open = Math.max(open, bucket)
  }
  return starts
}

/** Mean point of a bucket; after the last one, the last point of all. */
function meanOf(xs: ArrayLike<number>, ys: ArrayLike<number>, from: number, to: number): [number, number] {
  const end = Math.max(to, from + 1)
  let [x, y] = [0, 0]
  for (let i = from; i < end; i++) {
    x += xs[i] as number
    y += ys[i] as number
  }
  return [x / (end - from), y / (end - from)]
}

interface Bucket {
  xs: ArrayLike<number>
  ys: ArrayLike<number>
  from: number
  to: number
  before: number
  next: [number, number]
}

function largest({ xs, ys, from, to, before, next: [nextX, nextY] }: Bucket): number {
  const [x0, y0] = [xs[before] as number, ys[before] as number]
  let [best, most] = [from, -1]
  for (let i = from; i < to; i++) {
    const area = Math.abs((x0 - nextX) * ((ys[i] as number) - y0) - (x0 - (xs[i] as number)) * (nextY - y0))
    if (area > most) [best, most] = [i, area]
  }
  return best
}
