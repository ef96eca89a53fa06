import type { Correction, Outside, Readings } from './correction.ts'
import { removeLagged, type Efficiency } from './lagged-response.ts'

/** Metres of water per pascal: 1/(ρg) at 1000 kg/m³ and standard gravity. */
export const WATER_PER_PASCAL = 1 / (1000 * 9.80665)

/**
 * Takes off the effect of air pressure: a rise of the pressure presses the level in the well down by the barometric
 * efficiency times the rise, and so adds to drawdown.
 * @param pressure as metres of water, on the clock of the readings
 * @throws AnalysisError as `removeLagged`
 * Source: Jacob 1940; Kruseman & de Ridder, ILRI 47, from memory.
 */
export const removeBarometric = (readings: Readings, pressure: Outside, efficiency: Efficiency): Correction =>
  removeLagged('barometric', readings, pressure, efficiency, 1)
