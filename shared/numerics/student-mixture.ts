import { studentCdf, studentQuantile } from './student.ts'

/** One of several descriptions of a quantity: its share of the whole and its standard deviation. */
export interface MixedPart {
  share: number
  sd: number
}

/** Parts of a smaller share change no digit. */
const NEGLIGIBLE = 1e-12
const MOST_STEPS = 100
/** Relative width at which the quantile is known. */
const ENOUGH = 1e-13

/**
 * Quantile above one half of a mixture of Student's t distributions about zero, all of the same degrees of freedom.
 * It lies between the quantiles of the narrowest and the widest part, and is found by false position (Illinois rule).
 * @throws RangeError for a probability that is not between one half and one
 * Source: Dowell & Jarratt 1971 (from memory).
 */
export function mixtureQuantile(probability: number, parts: readonly MixedPart[], freedom: number): number {
  if (!(probability > 0.5 && probability < 1)) throw new RangeError(`No upper quantile at probability ${probability}`)
  const counted = parts.filter(({ share, sd }) => share > NEGLIGIBLE && sd > 0)
  const total = counted.reduce((sum, { share }) => sum + share, 0)
  const excess = (x: number) =>
    counted.reduce((sum, { share, sd }) => sum + share * studentCdf(x / sd, freedom), 0) / total - probability
  const quantile = studentQuantile(probability, freedom)
  const sds = counted.map(({ sd }) => sd)
  let [low, high] = [Math.min(...sds) * quantile, Math.max(...sds) * quantile]
  if (!(high > low * (1 + ENOUGH))) return high
  let [below, above] = [excess(low), excess(high)]
  let side = 0
  for (let step = 0; step < MOST_STEPS && high - low > ENOUGH * high; step++) {
    const x = (low * above - high * below) / (above - below)
    const here = excess(x)
    if (Math.abs(here) < ENOUGH) return x
    // An end that stays twice weighs half, so that it moves in the end.
    if (here > 0) {
      ;[high, above] = [x, here]
      if (side > 0) below /= 2
      side = 1
    } else {
      ;[low, below] = [x, here]
      if (side < 0) above /= 2
      side = -1
    }
  }
  return (low + high) / 2
}
