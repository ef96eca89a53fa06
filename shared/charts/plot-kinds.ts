import type { AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import { methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import type { Method } from '#shared/hydraulics/method.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'

/** The plots of a pumping test. */
export type PlotKind = 'linear' | 'semi-log' | 'log-log' | 'recovery' | 'composite' | 'distance'

interface PlotKindFacts {
  id: PlotKind
  label: string
  /** Whether the test has what the plot shows. */
  fits: (inputs: AnalysisInputs) => boolean
}

const FEWEST_DISTANCES = 2

const distances = ({ series }: AnalysisInputs) =>
  series.filter(({ role, distance_m }) => role === 'observation' && distance_m > 0).length

function stopped({ rates }: AnalysisInputs): boolean {
  return rates.some(({ rate_m3_s }) => rate_m3_s > 0) && rateHistory(rates).stop_s !== null
}

export const plotKinds: readonly PlotKindFacts[] = [
  { id: 'linear', label: 'Linear', fits: () => true },
  { id: 'semi-log', label: 'Semi-log', fits: () => true },
  { id: 'log-log', label: 'Log–log', fits: () => true },
  { id: 'recovery', label: 'Recovery', fits: stopped },
  { id: 'composite', label: 'Composite t/r²', fits: (inputs) => distances(inputs) >= FEWEST_DISTANCES },
  { id: 'distance', label: 'Distance', fits: (inputs) => distances(inputs) >= FEWEST_DISTANCES },
]

/** The plot in which a method is a straight line, or is usually judged. */
export const plotOfMethod = Object.fromEntries(
  Object.entries(methods).map(([id, method]) => [id, plotOf(method)]),
) as Record<MethodId, Exclude<PlotKind, 'composite'>>

function plotOf({ family, needs, options }: Method): Exclude<PlotKind, 'composite'> {
  if (family === 'curve') return 'log-log'
  if (needs.phase === 'recovery') return 'recovery'
  return options.some((option) => option.kind === 'line' && option.abscissa === 'distance') ? 'distance' : 'semi-log'
}

const abscissas: Partial<Record<PlotKind, string>> = {
  'semi-log': 'elapsed',
  recovery: 'time-ratio',
  distance: 'distance',
}

/** Whether the line of a method is a straight line of drawdown in this plot, to be marked and taken hold of. */
export const drawsLine = (method: MethodId, kind: PlotKind): boolean =>
  plotOfMethod[method] === kind &&
  methods[method].options.some((option) => option.kind === 'line' && option.abscissa === abscissas[kind])
