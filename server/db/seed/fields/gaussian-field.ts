import type { Draws } from '../random.ts'
import { draws } from '../random.ts'

export interface FieldModel {
  mean: number
  /** Standard deviation. */
  sd: number
  /** Practical range in metres: the correlation there is 5 %. */
  range: number
}

export type Field = (x: number, y: number) => number

/** Waves per field: enough that its covariance follows the model within about 3 % of the variance. */
const WAVES = 1_200

interface Wave {
  kx: number
  ky: number
  phase: number
}

/**
 * A wave number of the exponential covariance exp(−h/a): given a standard normal g, exp(−h²/(2a²g²)) averages to
 * exp(−h/a), so the spectrum is that of a Gaussian whose width is divided by |g|.
 */
function drawWave({ normal, uniform }: Draws, a: number): Wave {
  const width = 1 / (a * Math.abs(normal()))
  return { kx: width * normal(), ky: width * normal(), phase: uniform(0, 2 * Math.PI) }
}

/**
 * A stationary Gaussian field with exponential covariance sd²·exp(−3h/range), as a sum of random waves: a plain
 * function of place, the same at every call. Source: spectral method, Shinozuka & Jan 1972 (from memory).
 */
export function gaussianField(seed: number, subject: string, { mean, sd, range }: FieldModel): Field {
  const stream = draws(seed, `field/${subject}`)
  const waves = Array.from({ length: WAVES }, () => drawWave(stream, range / 3))
  const amplitude = sd * Math.sqrt(2 / WAVES)
  return (x, y) => {
    let sum = 0
    for (const { kx, ky, phase } of waves) sum += Math.cos(kx * x + ky * y + phase)
    return mean + amplitude * sum
  }
}

/** Covariance of the model at a distance in metres. */
export const covarianceAt = ({ sd, range }: FieldModel, distance: number) => sd * sd * Math.exp((-3 * distance) / range)
