import type { AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import type { MethodId } from '#shared/hydraulics/catalogue.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'

/** The plots of a pumping test. */
export type PlotKind = 'linear' | 'semi-log' | 'log-log' | 'recovery' | 'distance'

interface PlotKindFacts {
  id: PlotKind
  label: string
  /** Whether the test has what the plot shows. */
  fits: (inputs: AnalysisInputs) => boolean
}

const FEWEST_DISTANCES = 3

function stopped({ rates }: AnalysisInputs): boolean {
  return rates.some(({ rate_m3_s }) => rate_m3_s > 0) && rateHistory(rates).stop_s !== null
}

export const plotKinds: readonly PlotKindFacts[] = [
  { id: 'linear', label: 'Linear', fits: () => true },
  { id: 'semi-log', label: 'Semi-log', fits: () => true },
  { id: 'log-log', label: 'Log–log', fits: () => true },
  { id: 'recovery', label: 'Recovery', fits: stopped },
  {
    id: 'distance',
    label: 'Distance',
    fits: ({ series }) => series.filter(({ role }) => role === 'observation').length >= FEWEST_DISTANCES,
  },
]

/** The plot in which a method is a straight line, or is usually judged. */
export const plotOfMethod: Record<MethodId, PlotKind> = {
  'cooper-jacob': 'semi-log',
  theis: 'log-log',
  recovery: 'recovery',
  'distance-drawdown': 'distance',
}
