/** Copies `values[from..to]` into `into`, sorted (insertion sort: a window has some ten values). Returns their number. */
function sortWindow(values: ArrayLike<number>, from: number, to: number, into: Float64Array): number {
  let n = 0
  for (let i = from; i <= to; i++) {
    const value = values[i] ?? NaN
    let at = n++
    while (at > 0 && (into[at - 1] ?? 0) > value) {
      into[at] = into[at - 1] ?? 0
      at--
    }
    into[at] = value
  }
  return n
}

const middle = (sorted: Float64Array, n: number) =>
  n % 2 === 1 ? (sorted[n >> 1] ?? NaN) : ((sorted[n / 2 - 1] ?? NaN) + (sorted[n / 2] ?? NaN)) / 2

function medians(n: number, half: number, values: ArrayLike<number>, window: (i: number) => [number, number]) {
  const sorted = new Float64Array(2 * half + 1)
  return Float64Array.from({ length: n }, (_, i) => middle(sorted, sortWindow(values, ...window(i), sorted)))
}

/**
 * Median of `half` values on each side of every value and itself. Towards the ends the window shrinks on both sides,
 * so that on a curve that only rises or only falls the median is the value.
 */
export function centredMedian(values: ArrayLike<number>, half: number): Float64Array {
  const last = values.length - 1
  return medians(values.length, half, values, (i) => {
    const reach = Math.min(half, i, last - i)
    return [i - reach, i + reach]
  })
}

/** Median of the values within `half` positions; at the ends, of those there are. For values without a trend. */
export function localMedian(values: ArrayLike<number>, half: number): Float64Array {
  const last = values.length - 1
  return medians(values.length, half, values, (i) => [Math.max(0, i - half), Math.min(last, i + half)])
}
