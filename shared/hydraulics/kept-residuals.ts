import { sampleLogarithmically } from '#shared/numerics/logarithmic-thinning.ts'
import type { KeptResiduals, Residual, ResidualsShown } from './analysis.ts'

/** Residuals kept of each well: a log of 300,000 readings would make a result of 20 MB that nothing can draw. */
export const MOST_RESIDUALS = 2_000
/** Of these, how many are the largest: an outlier must not fall through the sieve. */
const MOST_OUTLIERS = 200

/**
 * Thins the residuals of each well that has more than `MOST_RESIDUALS`: first and last, the largest by size, the rest
 * evenly in the logarithm of time. Every kept one says how many readings it stands for, so that sums over the fitted
 * readings can still be made.
 * @param residuals in the order of the fit: well by well, times ascending and later than `origin_s`, the moment from
 * which the method's clock runs
 */
export function keptResiduals(residuals: Residual[], origin_s: number): KeptResiduals {
  const wells = byWell(residuals)
  const shown: ResidualsShown[] = []
  const kept = [...wells].flatMap(([wellId, all]) => {
    if (all.length <= MOST_RESIDUALS) return all
    const indices = keptIndices(all, origin_s)
    shown.push({ wellId, residualsShown: indices.length, of: all.length })
    const counts = readingsStoodFor(indices, all.length)
    return indices.map((index, k) => ({ ...(all[index] as Residual), standsFor: counts[k] as number }))
  })
  return shown.length > 0 ? { residuals: kept, residualsShown: shown } : { residuals: kept }
}

function byWell(residuals: Residual[]): Map<string, Residual[]> {
  const wells = new Map<string, Residual[]>()
  for (const residual of residuals) {
    const found = wells.get(residual.wellId)
    if (found) found.push(residual)
    else wells.set(residual.wellId, [residual])
  }
  return wells
}

function keptIndices(all: Residual[], origin_s: number): number[] {
  const times = all.map(({ elapsed_s }) => elapsed_s - origin_s)
  const even = sampleLogarithmically(times, MOST_RESIDUALS - MOST_OUTLIERS)
  return [...new Set([...even, ...largest(all)])].sort((a, b) => a - b)
}

function largest(all: Residual[]): number[] {
  const sizes = Float64Array.from(all, ({ residual_m }) => Math.abs(residual_m))
  const least = sizes.slice().sort()[sizes.length - MOST_OUTLIERS] as number
  const indices: number[] = []
  for (let i = 0; i < sizes.length && indices.length < MOST_OUTLIERS; i++)
    if ((sizes[i] as number) >= least) indices.push(i)
  return indices
}

/** Each index stands for the readings nearer to it, in order of time, than to its neighbours. */
function readingsStoodFor(indices: number[], total: number): number[] {
  const bounds = indices.map((index, k) => (k === 0 ? 0 : Math.ceil((index + (indices[k - 1] as number)) / 2)))
  return bounds.map((from, k) => (bounds[k + 1] ?? total) - from)
}
