import { makeNoise } from '../../numerics/make-noise.ts'

export interface Range {
  low: number
  high: number
}

/** A synthetic test whose truth is known, of one solution or method, and the intervals found from its noisy readings. */
export interface Family {
  id: string
  /** Solved in Laplace space, hence slow: fewer seeds. */
  laplace: boolean
  /** What the intervals are of, with the truth. */
  truth: Record<string, number>
  /** Readings of each series, one after the other. */
  counts: number[]
  /** Intervals found when noise of standard deviation 1, one value a reading, is added in the family's own size. */
  find(noise: number[]): Record<string, Range | null | undefined>
}

/** Noise of all series, each on its own; stationary, and alike from reading to reading by `phi`. */
export function noiseOf({ counts }: Family, seed: number, phi: number): number[] {
  return counts.flatMap((count, k) => makeNoise(seed + 10_007 * k, count, { phi }))
}

/** Share of the seeds from 1 on whose 95 % interval holds the truth, for each of the family's quantities. */
export function coverage(family: Family, seeds: number, phi = 0): Record<string, number> {
  const held = Object.fromEntries(Object.keys(family.truth).map((id) => [id, 0]))
  for (let seed = 1; seed <= seeds; seed++) {
    const found = family.find(noiseOf(family, seed, phi))
    for (const [id, truth] of Object.entries(family.truth)) {
      const range = found[id]
      if (range && range.low <= truth && truth <= range.high) held[id] = (held[id] as number) + 1
    }
  }
  return Object.fromEntries(Object.entries(held).map(([id, count]) => [id, count / seeds]))
}
