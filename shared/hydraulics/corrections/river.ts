import type { Correction, Outside, Readings } from './correction.ts'
import { removeLagged, type Efficiency } from './lagged-response.ts'

/**
 * Takes off the effect of a river or tidal gauge: a rise of the stage lifts the level in the well by the efficiency
 * times the rise, later by the lag, and so takes from drawdown.
 * @throws AnalysisError as `removeLagged`
 * Source: Ferris 1951 (stage ratio and lag), from memory.
 */
export const removeRiverStage = (readings: Readings, stage: Outside, efficiency: Efficiency): Correction =>
  removeLagged('river', readings, stage, efficiency, -1)
