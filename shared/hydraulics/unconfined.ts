import { AnalysisError } from './analysis-error.ts'
import type { AnalysisInputs, AnalysisOptions, Finding } from './analysis.ts'

/** Thinning matters, and its correction is offered, above this share of the saturated thickness. */
export const THINNING_OFFERED_ABOVE = 0.1
/** Above this share horizontal flow no longer holds and the correction is refused. */
export const THINNING_REFUSED_ABOVE = 0.5
/** Delayed drainage is normally over after three days of pumping (common practice). */
export const DRAINAGE_OVER_S = 72 * 3600

/**
 * Drawdown s' = s − s²/(2b) that a confined aquifer of the initial thickness b would have shown.
 * @throws RangeError when s exceeds half of b
 * Source: Jacob 1944.
 */
export function thinningCorrection(drawdown_m: number, thickness_m: number): number {
  if (!(thickness_m > 0)) throw new RangeError(`No saturated thickness of ${thickness_m} m`)
  if (drawdown_m > THINNING_REFUSED_ABOVE * thickness_m) throw new RangeError('Drawdown exceeds half the thickness')
  return drawdown_m - (drawdown_m * drawdown_m) / (2 * thickness_m)
}

/** Drawdown s whose corrected value is s': the inverse of thinningCorrection, for drawing; null beyond s' = b/2. */
export function uncorrectedDrawdown(corrected_m: number, thickness_m: number): number | null {
  const square = thickness_m * thickness_m - 2 * thickness_m * corrected_m
  return square >= 0 ? thickness_m - Math.sqrt(square) : null
}

/** Factor (b − s)/b that turns the storage found from corrected drawdowns into the aquifer's; s at the end of the test. */
export function thinnedStorageFactor(drawdown_m: number, thickness_m: number): number {
  return (thickness_m - drawdown_m) / thickness_m
}

/** True when the readings may be taken to follow delayed drainage: the analyst says so, or they last at least 72 h. */
export function isAfterDrainage({ afterDrainage }: AnalysisOptions, last_s: number): boolean {
  return afterDrainage ?? last_s >= DRAINAGE_OVER_S
}

/** Drawdowns as the options want them. @throws AnalysisError where the correction cannot be made */
export function thinnedDrawdown(drawdown_m: number[], inputs: AnalysisInputs, options: AnalysisOptions): number[] {
  if (!options.thinning) return drawdown_m
  if (inputs.aquifer !== 'unconfined') throw new AnalysisError('analysis/not-unconfined')
  const thickness = inputs.thickness_m
  if (thickness === null || !(thickness > 0)) throw new AnalysisError('analysis/no-thickness')
  const largest = drawdown_m.reduce((most, drawdown) => Math.max(most, drawdown), 0)
  if (largest > THINNING_REFUSED_ABOVE * thickness) {
    throw new AnalysisError('analysis/thinning-too-large', { drawdown_m: largest, thickness_m: thickness })
  }
  return drawdown_m.map((drawdown) => thinningCorrection(drawdown, thickness))
}

/** Statements about thinning for the largest drawdown used, before any correction. */
export function thinningFindings(largest_m: number, inputs: AnalysisInputs, options: AnalysisOptions): Finding[] {
  const thickness = inputs.thickness_m
  if (inputs.aquifer !== 'unconfined' || thickness === null || !(thickness > 0)) return []
  const params = { drawdown_m: largest_m, thickness_m: thickness, share: largest_m / thickness }
  if (options.thinning) return [{ code: 'thinning-corrected', severity: 'note', params }]
  if (params.share > THINNING_REFUSED_ABOVE) return [{ code: 'thinning-too-large', severity: 'bad', params }]
  if (params.share > THINNING_OFFERED_ABOVE) return [{ code: 'thinning-offered', severity: 'caution', params }]
  return []
}

/** Early readings of an unconfined aquifer must not be corrected. @throws AnalysisError for them */
export function thinningGuard(options: AnalysisOptions, last_s: number): void {
  if (options.thinning && !isAfterDrainage(options, last_s))
    throw new AnalysisError('analysis/thinning-early', { last_s })
}

/** Factor for S found from corrected drawdowns: their last ones, averaged over the wells; 1 without the correction. */
export function thinningFactor(
  inputs: AnalysisInputs,
  options: AnalysisOptions,
  wells: { measured_m: number[] }[],
): number {
  if (!options.thinning || inputs.thickness_m === null) return 1
  const last = wells.map((well) => well.measured_m.at(-1) ?? 0)
  return thinnedStorageFactor(last.reduce((sum, value) => sum + value, 0) / last.length, inputs.thickness_m)
}

/** Modelled drawdown as it would be measured: uncorrected where the readings were corrected. */
export function drawnDrawdown(modelled_m: number, inputs: AnalysisInputs, options: AnalysisOptions): number | null {
  return options.thinning && inputs.thickness_m ? uncorrectedDrawdown(modelled_m, inputs.thickness_m) : modelled_m
}
