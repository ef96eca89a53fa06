import { AnalysisError } from '../analysis-error.ts'
import type { Finding } from '../analysis.ts'
import { lengthFindings, type Antecedent } from './antecedent.ts'
import type { Efficiency, Outside, Readings } from './correction.ts'
import type { CorrectionKind } from './kinds.ts'
import { readOutside } from './outside-series.ts'
import type { Term } from './term.ts'

/** Readings before pumping that a regression needs: level, trend and efficiency, and some left. */
const FEWEST_READINGS = 6
/** Lags tried beyond this cost time and tell nothing. */
const MOST_LAGS = 400

interface Lagged {
  kind: CorrectionKind
  outside: Outside
  efficiency: Efficiency
  /** Of drawdown when the outside value rises: +1 for air pressure, −1 for a stage. */
  sign: 1 | -1
}

/**
 * What an outside series moves: effect = sign·efficiency·(value(t − lag) − value(−lag)), so that the effect is zero when
 * pumping begins. A rise of air pressure presses the level in the well down by the barometric efficiency times the rise
 * (as metres of water); a rise of a stage lifts it by the efficiency, later by the lag.
 * @throws AnalysisError for a series that does not cover the included readings, or settings that cannot be
 */
export function laggedTerm({ kind, outside, efficiency, sign }: Lagged, readings: Readings, before: Antecedent): Term {
  checkEfficiency(efficiency)
  const given = 'given' in efficiency
  const reach = given ? efficiency.lag_s : efficiency.longestLag_s
  const span = spanOf(readings)
  const { read, findings } = readOutside(outside, span.from_s - reach, given ? span.to_s - reach : span.to_s)
  return {
    kind,
    given: given ? [efficiency.given] : null,
    needed: FEWEST_READINGS,
    lags_s: given ? [efficiency.lag_s] : lagsOf(efficiency.longestLag_s, efficiency.lagStep_s),
    columns: (times, lag_s) => {
      const start = read(-lag_s)
      return [times.map((time) => sign * (read(time - lag_s) - start))]
    },
    record: ({ coefficients: [value = 0], covariance, lag_s }) => ({
      efficiency: value,
      ...(given ? {} : { efficiencySd: Math.sqrt(Math.max(0, covariance[0]?.[0] ?? 0)) }),
      lag_s,
    }),
    findings: ({ coefficients: [value = 0], lag_s }) => [
      ...findings,
      ...oddFindings(value),
      ...(given ? [] : [...lengthFindings(before), ...lagFindings(lag_s, efficiency.longestLag_s)]),
    ],
  }
}

function checkEfficiency(efficiency: Efficiency): void {
  if ('given' in efficiency) {
    const valid = Number.isFinite(efficiency.given) && efficiency.lag_s >= 0
    if (!valid) throw new AnalysisError('analysis/bad-option', { option: 'efficiency' })
  } else if (!(efficiency.longestLag_s >= 0 && efficiency.lagStep_s > 0)) {
    throw new AnalysisError('analysis/bad-option', { option: 'lag' })
  } else if (efficiency.longestLag_s / efficiency.lagStep_s > MOST_LAGS) {
    throw new AnalysisError('analysis/bad-option', { option: 'lagCount' })
  }
}

const lagsOf = (longest_s: number, step_s: number) =>
  Array.from({ length: Math.floor(longest_s / step_s + 1e-9) + 1 }, (_, k) => k * step_s)

/** From the first included reading, or the start of pumping, to the last. */
function spanOf({ elapsed_s, included }: Readings) {
  return elapsed_s.reduce(
    ({ from_s, to_s }, time, i) =>
      Number.isFinite(time) && (included?.[i] ?? true)
        ? { from_s: Math.min(from_s, time), to_s: Math.max(to_s, time) }
        : { from_s, to_s },
    { from_s: 0, to_s: 0 },
  )
}

function oddFindings(efficiency: number): Finding[] {
  return efficiency < 0 || efficiency > 1
    ? [{ code: 'correction-odd', severity: 'caution', params: { efficiency } }]
    : []
}

const lagFindings = (lag_s: number, longest_s: number): Finding[] =>
  lag_s > 0 && lag_s >= longest_s * (1 - 1e-9) ? [{ code: 'lag-at-end', severity: 'caution', params: { lag_s } }] : []
