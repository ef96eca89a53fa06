import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64'
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus'

export interface Draws {
  /** Uniform in [low, high). */
  uniform(low?: number, high?: number): number
  /** Normal with the given mean and standard deviation (Box & Muller 1958). */
  normal(mean?: number, sd?: number): number
  /** Whole number in [low, high], both included. */
  whole(low: number, high: number): number
  pick<T>(items: readonly T[]): T
  chance(probability: number): boolean
}

/** FNV-1a, so that each named subject has its own stream and adding one subject does not shift the others. */
export function hashName(name: string): number {
  let hash = 0x811c9dc5
  for (let i = 0; i < name.length; i++) hash = Math.imul(hash ^ name.charCodeAt(i), 0x01000193)
  return hash | 0
}

/** A reproducible stream of draws for one subject of the demo region. */
export function draws(seed: number, subject: string): Draws {
  const generator = xoroshiro128plus(hashName(`${seed}/${subject}`))
  const uniform = (low = 0, high = 1) => low + (high - low) * uniformFloat64(generator)
  return {
    uniform,
    normal: (mean = 0, sd = 1) =>
      mean + sd * Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform()),
    whole: (low, high) => low + Math.floor(uniform() * (high - low + 1)),
    chance: (probability) => uniform() < probability,
    pick(items) {
      const item = items[Math.floor(uniform() * items.length)]
      if (item === undefined) throw new RangeError('cannot pick from an empty list')
      return item
    },
  }
}
