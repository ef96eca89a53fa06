/**
 * Lag-1 autocorrelation of residuals, pooled over groups (each in order of time), corrected for the bias that fitting
 * `unknowns` parameters brings: about -(unknowns + (unknowns + 2)ρ)/n. Clipped to -0.99…0.99; 0 where nothing can be said.
 * Source: Kendall 1954 and Marriott & Pope 1954 for one fitted mean, extended to more parameters (common practice).
 */
export function lagOneAutocorrelation(groups: ArrayLike<number>[], unknowns: number): number {
  let products = 0
  let squares = 0
  let count = 0
  for (const group of groups) {
    for (let i = 0; i < group.length; i++) {
      const value = group[i] as number
      squares += value * value
      if (i > 0) products += value * (group[i - 1] as number)
    }
    count += group.length
  }
  if (!(squares > 0) || count <= unknowns + 3) return 0
  const corrected = (count * (products / squares) + unknowns) / (count - unknowns - 2)
  return Math.max(-0.99, Math.min(0.99, corrected))
}

/** Number of independent readings that carry the information of `count` readings with lag-1 autocorrelation `rho` of an AR(1) process. Never more than `count`. */
export function effectiveNumber(count: number, rho: number): number {
  const positive = Math.max(0, rho)
  return (count * (1 - positive)) / (1 + positive)
}

/** Degrees of freedom left by `unknowns` parameters, at least one, so that an interval can be wide but not absent. */
export function residualFreedom(effectiveCount: number, unknowns: number): number {
  return Math.max(1, effectiveCount - unknowns)
}
