import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import {
  assumedStorage,
  specificCapacityMethod,
} from '#shared/hydraulics/specific-capacity/specific-capacity-method.ts'
import type {
  SpecificCapacityInputs,
  SpecificCapacityOptions,
} from '#shared/hydraulics/specific-capacity/specific-capacity-test.ts'
import { unitById } from '#shared/quantities/units.ts'
import { logAxis } from './axis.ts'
import type { XY } from './plot-wells.ts'
import { evenly, type SimplePlot } from './simple-plot.ts'

/** Factor to either side of the storativity assumed over which transmissivity is drawn. */
const REACH = 1000
const MOST_STORATIVITY = 0.5

interface CapacityPlotRequest {
  inputs: SpecificCapacityInputs
  options: SpecificCapacityOptions
  /** T found, m²/s; null where there is none. */
  T: number | null
  /** Unit id of transmissivity. */
  unit: string
}

/** What the assumed storativity does to transmissivity: the one drawdown is known, it is not. */
export function capacityPlot({ inputs, options, T, unit }: CapacityPlotRequest): SimplePlot {
  const assumed = assumedStorage[inputs.aquifer]
  const S = options.storativity ?? assumed.value
  const logSd = options.storativityLogSd ?? assumed.logSd
  const toUnit = (value: number) => value / unitById(unit).toSI
  const line = evenly(Math.log10(S / REACH), Math.log10(Math.min(MOST_STORATIVITY, S * REACH)), 60).flatMap(
    (log): XY[] => {
      const found = transmissivityAt(inputs, { ...options, storativity: 10 ** log })
      return found === null ? [] : [[10 ** log, toUnit(found)]]
    },
  )
  const points = T === null ? [] : [{ x: S, y: toUnit(T), fitted: toUnit(T), state: 'used' as const }]
  const [from, to] = [S / 10 ** logSd, Math.min(MOST_STORATIVITY, S * 10 ** logSd)]
  return {
    x: logAxis([...line.map(([x]) => x), from, to], 'storativity assumed'),
    y: logAxis(
      line.map(([, y]) => y),
      `transmissivity, ${unitById(unit).label}`,
    ),
    dots: [{ label: 'as assumed', points, of: points.length }],
    lines: [{ label: 'transmissivity', points: line }],
    shades: [{ axis: 'x', from, to, label: 'two cases of three' }],
    moments: [],
  }
}

function transmissivityAt(inputs: SpecificCapacityInputs, options: SpecificCapacityOptions): number | null {
  try {
    return specificCapacityMethod.run(inputs, options).T?.value ?? null
  } catch (error) {
    if (error instanceof AnalysisError) return null
    throw error
  }
}
