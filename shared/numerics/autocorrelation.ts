/**
 * Lag-1 autocorrelation of residuals about zero, pooled over groups, each in order; 0 where nothing can be said.
 * A description of the residuals only: intervals come from `correlatedCovariance`, which knows the spacing.
 */
export function lagOneAutocorrelation(groups: ArrayLike<number>[]): number {
  let products = 0
  let squares = 0
  for (const group of groups) {
    for (let i = 0; i < group.length; i++) {
      const value = group[i] as number
      squares += value * value
      if (i > 0) products += value * (group[i - 1] as number)
    }
  }
  return squares > 0 ? products / squares : 0
}
