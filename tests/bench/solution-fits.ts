import { curveMethod } from '#shared/hydraulics/curve-method.ts'
import type { AnalysisInputs, ChosenBoundary } from '#shared/hydraulics/analysis.ts'
import { boundedSolution } from '#shared/hydraulics/boundaries/bounded-solution.ts'
import type { Solution } from '#shared/hydraulics/solution.ts'
import { largeDiameter, largeDiameterSkin } from '#shared/hydraulics/solutions/large-diameter.ts'
import { leakyPartialPenetration } from '#shared/hydraulics/solutions/leaky-partial-penetration.ts'
import { leakyStorage } from '#shared/hydraulics/solutions/leaky-storage.ts'
import { leaky } from '#shared/hydraulics/solutions/leaky.ts'
import { partialPenetration, partialPenetrationIsotropic } from '#shared/hydraulics/solutions/partial-penetration.ts'
import { unconfined } from '#shared/hydraulics/solutions/unconfined.ts'
import { theis } from '#shared/hydraulics/theis.ts'
import { medianMilliseconds, report } from '../support/bench.ts'
import { DAY, logSpaced, makeInputs, makeOptions, makeSeries } from '../shared/hydraulics/make-inputs.ts'
import { withDrawdown } from '../shared/hydraulics/make-readings.ts'
import { makeNoise } from '../shared/numerics/make-noise.ts'

/** Time of a whole analysis of 1,000 readings by each solution: starts found and followed, intervals, findings. */
const COUNT = 1000
const noise = makeNoise(1, COUNT)

const inputs: AnalysisInputs = makeInputs({
  thickness_m: 20,
  pumpedWell: { wellRadius_m: 0.5, casingRadius_m: 0.5, screen: { top_m: 0, bottom_m: 8 } },
  series: [
    makeSeries({
      distance_m: 12,
      bearing_deg: 0,
      screen: { top_m: 12, bottom_m: 14 },
      elapsed_s: logSpaced(COUNT, 20, 3 * DAY),
    }),
  ],
})

const barrier: ChosenBoundary = { kind: 'barrier', distance_m: null, bearing_deg: 90 }
const streamBehind: ChosenBoundary = { kind: 'recharge', distance_m: null, bearing_deg: 270 }

const cases: { solution: Solution; parameters: number[]; boundaries?: ChosenBoundary[]; runs?: number }[] = [
  { solution: theis, parameters: [5e-3, 2e-4] },
  { solution: theis, parameters: [5e-3, 2e-4, 150], boundaries: [barrier] },
  { solution: theis, parameters: [5e-3, 2e-4, 150, 300], boundaries: [barrier, streamBehind], runs: 2 },
  { solution: leaky, parameters: [5e-3, 2e-4, 100] },
  { solution: leakyStorage, parameters: [5e-3, 2e-4, 80] },
  { solution: partialPenetrationIsotropic, parameters: [5e-3, 2e-4] },
  { solution: partialPenetration, parameters: [5e-3, 2e-4, 0.1], runs: 4 },
  { solution: leakyPartialPenetration, parameters: [5e-3, 2e-4, 100, 0.1], runs: 2 },
  { solution: largeDiameter, parameters: [5e-3, 5e-4], runs: 4 },
  { solution: largeDiameterSkin, parameters: [5e-3, 5e-4, 2], runs: 4 },
  { solution: unconfined, parameters: [5e-3, 1e-3, 0.1, 0.3], runs: 4 },
]

for (const { solution, parameters, boundaries = [], runs = 10 } of cases) {
  const exact = withDrawdown(boundedSolution(solution, boundaries), parameters, inputs, (i) => 0.005 * (noise[i] ?? 0))
  const method = curveMethod(solution)
  const options = makeOptions({ boundaries, readingsPerCycle: null })
  const edges = boundaries.map(({ kind }) => (kind === 'barrier' ? 'barrier' : 'stream')).join(' and ')
  const name = edges ? `${solution.id} with the distance to ${edges} fitted` : solution.id
  const spent = medianMilliseconds(runs, () => void method.run(exact, options))
  report('solution-fits', `median time of an analysis of 1,000 readings, ${name}`, spent, 'ms')
}
