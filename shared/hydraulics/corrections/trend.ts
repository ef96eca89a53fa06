import {
  antecedentOf,
  correctionOf,
  explainedFindings,
  lengthFindings,
  type Correction,
  type Readings,
} from './correction.ts'
import { regression } from './regression.ts'

const FEWEST_READINGS = 3

/**
 * Takes off the linear trend of the readings before pumping, carried through the test.
 * @throws AnalysisError with fewer than three readings before pumping
 * Source: common practice; Kruseman & de Ridder, ILRI 47, from memory.
 */
export function removeTrend(readings: Readings): Correction {
  const before = antecedentOf(readings, FEWEST_READINGS)
  const fit = regression(
    before.elapsed_s.map((time) => [1, time]),
    before.drawdown_m,
  )
  const [start_m = 0, slope_m_s = 0] = fit.coefficients
  return correctionOf(
    'trend',
    readings,
    readings.elapsed_s.map((time) => start_m + slope_m_s * time),
    { start_m, slope_m_s, slopeSd_m_s: fit.sd[1] as number, explained: fit.explained },
    [...lengthFindings(before), ...explainedFindings(fit.explained)],
  )
}
