import { AnalysisError } from '../analysis-error.ts'
import { regression, regressionBeside, regressionCovariance, type Regression } from './regression.ts'
import type { Learned, Term } from './term.ts'

interface Learning {
  /** Level and trend, which stand beside everything that is learned whether they are taken off or not. */
  trend: Term
  others: Term[]
}

/** Searches of single lags, one after the other, until none moves; they settle in two or three rounds. */
const MOST_ROUNDS = 10

/**
 * Level, trend and all terms by one regression; each lag is that with the fewest squares beside the others.
 * @throws AnalysisError for a series that does not move, or that moves like another
 */
export function learnTerms({ trend, others }: Learning, time_s: number[], drawdown_m: number[]): Map<Term, Learned> {
  const all = [trend, ...others]
  const lags = bestLags(all, time_s, drawdown_m)
  const parts = all.map((term, k) => term.columns(time_s, lags[k] as number))
  const columns = parts.flat()
  const fit = regression(columns, drawdown_m)
  if (fit.singular) throw singular(parts, drawdown_m)
  const covariance = regressionCovariance(fit, columns, time_s)
  return new Map(
    all.map((term, k) => {
      const from = parts.slice(0, k).reduce((sum, part) => sum + part.length, 0)
      const to = from + (parts[k] as number[][]).length
      const without = [...parts.filter((_, i) => i !== k).flat(), ...(term.remaining?.(time_s) ?? [])]
      return [
        term,
        {
          coefficients: fit.coefficients.slice(from, to),
          covariance: covariance.slice(from, to).map((row) => row.slice(from, to)),
          lag_s: lags[k] as number,
          explained: explainedOf(fit, regression(without, drawdown_m)),
        },
      ]
    }),
  )
}

const explainedOf = (fit: Regression, without: Regression) =>
  without.squares > 0 ? Math.max(0, 1 - fit.squares / without.squares) : 0

function bestLags(terms: Term[], time_s: number[], drawdown_m: number[]): number[] {
  const parts = terms.map((): number[][][] => [])
  const chosen = terms.map(() => 0)
  // Reading a series at hundreds of lags is most of the work, and every round asks for the same.
  const columnsAt = (term: number, lag: number) =>
    ((parts[term] as number[][][])[lag] ??= (terms[term] as Term).columns(
      time_s,
      (terms[term] as Term).lags_s[lag] as number,
    ))
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const moved = terms.map(({ lags_s }, k) => {
      if (lags_s.length === 1) return false
      const beside = terms.flatMap((_, i) => (i === k ? [] : columnsAt(i, chosen[i] as number)))
      const withLag = regressionBeside(beside, drawdown_m)
      const best = leastSquares(lags_s.length, (lag) => withLag(columnsAt(k, lag)))
      const changed = best !== chosen[k]
      chosen[k] = best
      return changed
    })
    if (!moved.some(Boolean)) break
  }
  return terms.map(({ lags_s }, k) => lags_s[chosen[k] as number] as number)
}

/** Index of the lag with the fewest squares among those that can be told from the rest; the first where none can. */
function leastSquares(count: number, fitAt: (lag: number) => Regression): number {
  let best = 0
  let least = Infinity
  for (let lag = 0; lag < count; lag++) {
    const { squares, singular } = fitAt(lag)
    if (!singular && squares < least) [best, least] = [lag, squares]
  }
  return best
}

/** Either a term says nothing beside level and trend, or two say the same. */
function singular([trend = [], ...others]: number[][][], drawdown_m: number[]): AnalysisError {
  const level = others.some((part) => regression([...trend, ...part], drawdown_m).singular)
  return new AnalysisError(level ? 'analysis/correction-level' : 'analysis/correction-alike')
}
