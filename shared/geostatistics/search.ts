/** A point of a search and what it scored. */
export interface Scored {
  at: number[]
  score: number
}

/**
 * Compass search for a maximum (Kolda, Lewis & Torczon 2003): tries a step each way along each axis, halves the steps
 * when none helps, stops when all are below `tolerance` of the first. Safe on bounds, needs no derivative.
 */
export function compassSearch(
  score: (at: readonly number[]) => number,
  start: readonly number[],
  steps: readonly number[],
  tolerance = 0.02,
): Scored {
  let best: Scored = { at: [...start], score: score(start) }
  for (let share = 1; share > tolerance;) {
    const before = best.score
    for (let axis = 0; axis < start.length; axis++) {
      for (const sign of [1, -1]) {
        const at = best.at.map((value, i) => (i === axis ? value + sign * share * steps[axis]! : value))
        const next = score(at)
        if (next > best.score) {
          best = { at, score: next }
          break
        }
      }
    }
    if (best.score <= before) share /= 2
  }
  return best
}

/** How far along one axis the score falls by `drop`, at most `limit`, found by doubling and halving. */
export function widthOfPeak(
  score: (at: readonly number[]) => number,
  peak: Scored,
  axis: number,
  drop: number,
  limit: number,
): number {
  const fallen = (width: number): boolean =>
    [1, -1].every((sign) => {
      const at = peak.at.map((value, i) => (i === axis ? value + sign * width : value))
      return score(at) < peak.score - drop
    })
  let width = limit
  while (width > limit / 64 && fallen(width)) width /= 2
  return width
}
