/** Copies `values[from..to]` into `into`, sorted (insertion sort: a window has some ten values). */
function sortedWindow(values: ArrayLike<number>, from: number, to: number, into: Float64Array): number {
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

export interface Window {
  median: number
  /** Median of the absolute deviations from the median, in the same window. */
  mad: number
}

/**
 * Median and MAD of the window of `half` values on each side of every value, window and value alike in file order.
 * Towards the ends the window shrinks on both sides, so that the slope of a curve is never taken for an outlier.
 */
export function runningMedian(values: ArrayLike<number>, half: number): Window[] {
  const sorted = new Float64Array(2 * half + 1)
  const deviations = new Float64Array(2 * half + 1)
  return Array.from({ length: values.length }, (_, i) => {
    const reach = Math.min(half, i, values.length - 1 - i)
    const n = sortedWindow(values, i - reach, i + reach, sorted)
    const median = middle(sorted, n)
    for (let k = 0; k < n; k++) deviations[k] = Math.abs((sorted[k] ?? NaN) - median)
    const m = sortedWindow(deviations.slice(0, n), 0, n - 1, sorted)
    return { median, mad: middle(sorted, m) }
  })
}
