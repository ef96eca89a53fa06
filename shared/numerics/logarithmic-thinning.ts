/**
 * Indices of the values kept when at most `perCycle` are wanted in each factor of ten: the first value in each equal
 * logarithmic bin, and the last value of all. Values must be positive and ascending; all are kept when `perCycle` is null.
 * A logger's thousands of late readings would otherwise outvote the early ones.
 */
export function thinLogarithmically(values: ArrayLike<number>, perCycle: number | null): number[] {
  const all = Array.from({ length: values.length }, (_, i) => i)
  if (perCycle === null) return all
  if (!(perCycle > 0)) throw new RangeError(`Cannot keep ${perCycle} values per factor of ten`)
  let lastBin = -Infinity
  const last = values.length - 1
  return all.filter((i) => {
    const bin = Math.floor(Math.log10(values[i] as number) * perCycle)
    const opens = bin > lastBin
    lastBin = Math.max(bin, lastBin)
    return opens || i === last
  })
}

/**
 * Indices of at most `most` (2 or more) values spread evenly in their logarithm, with the first and the last. Values must
 * be positive and ascending. Where early values lie too far apart to be spread finely, the later ones get their share.
 */
export function sampleLogarithmically(values: ArrayLike<number>, most: number): number[] {
  if (!(most >= 2)) throw new RangeError(`Cannot sample ${most} values`)
  if (values.length <= most) return Array.from({ length: values.length }, (_, i) => i)
  const last = values.length - 1
  const end = Math.log(values[last] as number)
  const kept: number[] = []
  let next = -Infinity
  for (let i = 0; i < last && kept.length < most - 1; i++) {
    const at = Math.log(values[i] as number)
    if (at < next) continue
    kept.push(i)
    next = at + (end - at) / (most - kept.length)
  }
  return [...kept, last]
}
