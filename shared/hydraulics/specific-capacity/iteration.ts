import { STRAIGHT_LINE_CONSTANT } from '../small-u.ts'

const MOST_ROUNDS = 1000
const TOLERANCE = 1e-12

export interface SpecificCapacityProblem {
  rate_m3_s: number
  /** Drawdown that the aquifer causes: well loss taken off. */
  formation_m: number
  duration_s: number
  wellRadius_m: number
  S: number
  /** s_p of partial penetration. */
  penetration: number
}

/** Q/(4π s), the T that one unit of the bracket is worth. */
export const unitTransmissivity = ({ rate_m3_s, formation_m }: SpecificCapacityProblem) =>
  rate_m3_s / (4 * Math.PI * formation_m)

/** Next T = Q/(4π s)·[ln(2.25Tt/(r²S)) + 2 s_p]. Source: Theis 1963; Bradbury & Rothschild 1985; ASTM D5472. */
export function nextTransmissivity(problem: SpecificCapacityProblem, T: number): number {
  const { duration_s, wellRadius_m, S, penetration } = problem
  const bracket = Math.log((STRAIGHT_LINE_CONSTANT * T * duration_s) / (wellRadius_m ** 2 * S)) + 2 * penetration
  return unitTransmissivity(problem) * bracket
}

/**
 * T by iteration. The right side is concave in T, so that of its two fixed points only the upper one, where T exceeds
 * Q/(4πs), repeats itself; the search comes from above.
 * @returns null where there is none: the drawdown is too large, or the time too short, for the storativity assumed
 */
export function iterateTransmissivity(problem: SpecificCapacityProblem): { T: number; iterations: number } | null {
  const unit = unitTransmissivity(problem)
  let T = unit * Math.max(2, 2 * (nextTransmissivity(problem, unit) / unit))
  for (let iterations = 1; iterations <= MOST_ROUNDS; iterations++) {
    const next = nextTransmissivity(problem, T)
    if (!(next > unit)) return null
    if (Math.abs(next - T) <= TOLERANCE * T) return { T: next, iterations }
    T = next
  }
  return null
}
