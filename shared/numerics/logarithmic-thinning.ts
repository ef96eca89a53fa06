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
