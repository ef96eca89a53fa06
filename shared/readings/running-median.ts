/** Numbers in order, with room for a window: insertion and removal by bisection, O(log w) comparisons. */
class SortedWindow {
  private readonly sorted: Float64Array
  private size = 0

  constructor(capacity: number) {
    this.sorted = new Float64Array(capacity)
  }

  private place(value: number): number {
    let [low, high] = [0, this.size]
    while (low < high) {
      const middle = (low + high) >> 1
      if ((this.sorted[middle] ?? NaN) < value) low = middle + 1
      else high = middle
    }
    return low
  }

  add(value: number) {
    const at = this.place(value)
    this.sorted.copyWithin(at + 1, at, this.size++)
    this.sorted[at] = value
  }

  remove(value: number) {
    const at = this.place(value)
    this.sorted.copyWithin(at, at + 1, this.size--)
  }

  median(): number {
    const middle = this.size >> 1
    const upper = this.sorted[middle] ?? NaN
    return this.size % 2 === 1 ? upper : ((this.sorted[middle - 1] ?? NaN) + upper) / 2
  }
}

/** Medians of windows whose ends `from(i)` and `to(i)` (both included) never go back. Values are finite. */
function medians(values: ArrayLike<number>, width: number, from: (i: number) => number, to: (i: number) => number) {
  const window = new SortedWindow(width)
  let [first, next] = [0, 0]
  return Float64Array.from({ length: values.length }, (_, i) => {
    while (first < from(i)) window.remove(values[first++] ?? NaN)
    while (next <= to(i)) window.add(values[next++] ?? NaN)
    return window.median()
  })
}

/**
 * Median of `half` values on each side of every value and itself. Towards the ends the window shrinks on both sides,
 * so that on a curve that only rises or only falls the median is the value.
 */
export function centredMedian(values: ArrayLike<number>, half: number): Float64Array {
  const last = values.length - 1
  const reach = (i: number) => Math.min(half, i, last - i)
  return medians(
    values,
    2 * half + 1,
    (i) => i - reach(i),
    (i) => i + reach(i),
  )
}

/** Median of the values within `half` positions; at the ends, of those there are. For values without a trend. */
export function localMedian(values: ArrayLike<number>, half: number): Float64Array {
  const last = values.length - 1
  return medians(
    values,
    2 * half + 1,
    (i) => Math.max(0, i - half),
    (i) => Math.min(last, i + half),
  )
}
