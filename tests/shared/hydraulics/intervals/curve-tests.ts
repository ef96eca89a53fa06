import type { AnalysisInputs, ChosenBoundary } from '#shared/hydraulics/analysis.ts'
import type { Solution } from '#shared/hydraulics/solution.ts'
import { largeDiameter, largeDiameterSkin } from '#shared/hydraulics/solutions/large-diameter.ts'
import { leakyPartialPenetration } from '#shared/hydraulics/solutions/leaky-partial-penetration.ts'
import { leakyStorage } from '#shared/hydraulics/solutions/leaky-storage.ts'
import { leaky } from '#shared/hydraulics/solutions/leaky.ts'
import { partialPenetration, partialPenetrationIsotropic } from '#shared/hydraulics/solutions/partial-penetration.ts'
import { unconfined } from '#shared/hydraulics/solutions/unconfined.ts'
import { theis } from '#shared/hydraulics/theis.ts'
import { DAY, logSpaced, makeInputs, makeSeries } from '../make-inputs.ts'

/** A synthetic test of one solution. */
export interface CurveTest {
  id?: string
  solution: Solution
  /** In the order of the unknowns, fitted distances of boundaries last. */
  parameters: number[]
  inputs: AnalysisInputs
  sigma_m?: number
  laplace?: boolean
  boundaries?: ChosenBoundary[]
  /** Search from near the truth alone, where following every start would take minutes. */
  oneStart?: boolean
}

const times = (count: number, from = 60, to = DAY) => logSpaced(count, from, to)
const pumped = (overrides: Parameters<typeof makeSeries>[0] = {}) =>
  makeSeries({ wellId: 'p', role: 'pumped', elapsed_s: [], wellRadius_m: 0.15, casingRadius_m: 0.1, ...overrides })

const single = (readings: number) => makeInputs({ series: [makeSeries({ elapsed_s: times(readings) })] })
/** Two piezometers at unlike depths near a well that is open to the upper third. */
const nested = (readings: number) =>
  makeInputs({
    thickness_m: 30,
    series: [
      pumped({ screen: { top_m: 0, bottom_m: 10 } }),
      makeSeries({ wellId: 'o1', distance_m: 8, elapsed_s: times(readings), screen: { top_m: 3, bottom_m: 5 } }),
      makeSeries({ wellId: 'o2', distance_m: 15, elapsed_s: times(readings), screen: { top_m: 24, bottom_m: 26 } }),
    ],
  })
const storing = (readings: number) =>
  makeInputs({
    series: [
      pumped({ wellRadius_m: 0.5, casingRadius_m: 0.5, elapsed_s: times(readings, 30) }),
      makeSeries({ distance_m: 12, elapsed_s: times(readings) }),
    ],
  })
const drained = (readings: number) =>
  makeInputs({
    aquifer: 'unconfined',
    thickness_m: 20,
    series: [pumped(), makeSeries({ distance_m: 12, elapsed_s: times(readings, 10, 3 * DAY) })],
  })
const east: Pick<ChosenBoundary, 'bearing_deg'> = { bearing_deg: 90 }
const beside = (readings: number) =>
  makeInputs({ series: [makeSeries({ bearing_deg: 0, elapsed_s: times(readings) })] })

/**
 * One test for each solution, and for boundaries at a known and at a fitted distance.
 * @param dense readings as many as a logger thinned for a fit gives; else as few as show the same in less time
 */
export const curveTests = (dense: boolean): CurveTest[] => [
  { solution: theis, parameters: [5e-3, 2e-4], inputs: single(dense ? 100 : 40) },
  { solution: leaky, parameters: [5e-3, 2e-4, 250], inputs: single(dense ? 100 : 30) },
  { solution: leakyStorage, parameters: [5e-3, 2e-4, 200], inputs: single(dense ? 100 : 30) },
  { solution: partialPenetrationIsotropic, parameters: [5e-3, 2e-4], inputs: nested(dense ? 60 : 15) },
  { solution: partialPenetration, parameters: [5e-3, 2e-4, 0.1], inputs: nested(dense ? 60 : 12), oneStart: !dense },
  {
    solution: leakyPartialPenetration,
    parameters: [5e-3, 2e-4, 150, 0.1],
    inputs: nested(dense ? 60 : 8),
    oneStart: !dense,
  },
  {
    solution: largeDiameter,
    parameters: [1e-3, 5e-4],
    inputs: storing(dense ? 60 : 10),
    laplace: true,
    oneStart: !dense,
  },
  {
    solution: largeDiameterSkin,
    parameters: [1e-3, 5e-4, 3],
    inputs: storing(dense ? 60 : 10),
    laplace: true,
    oneStart: !dense,
  },
  {
    solution: unconfined,
    parameters: [5e-3, 1e-3, 0.1, 0.3],
    inputs: drained(dense ? 60 : 10),
    sigma_m: 0.003,
    laplace: true,
    oneStart: !dense,
  },
  {
    id: 'stream',
    solution: theis,
    parameters: [5e-3, 2e-4],
    inputs: beside(dense ? 100 : 40),
    boundaries: [{ ...east, kind: 'recharge' as const, distance_m: 150 }],
  },
  {
    id: 'barrier',
    solution: theis,
    parameters: [5e-3, 2e-4, 200],
    inputs: beside(dense ? 100 : 40),
    boundaries: [{ ...east, kind: 'barrier' as const, distance_m: null }],
  },
]
