import { curveProblem } from '#shared/hydraulics/curve-problem.ts'
import { leaky, leakyDrawdown } from '#shared/hydraulics/solutions/leaky.ts'
import { levenbergMarquardt } from '#shared/numerics/levenberg-marquardt.ts'
import { fromPython, medianMilliseconds, report } from '../support/bench.ts'
import { makePlace } from '../support/place.ts'
import { logSpaced } from '../shared/hydraulics/make-inputs.ts'
import { makeNoise } from '../shared/numerics/make-noise.ts'

/** One leaky fit of 1,000 noisy readings, beside scipy's curve_fit from the same start on the same readings. */
const [rate, distance, count, repeats] = [0.01, 50, 1000, 20]
const truth = [5e-3, 2e-4, 200] as const
/** Ten times off in all three. */
const start = [5e-2, 2e-3, 2000]
const elapsed_s = logSpaced(count, 60, 86_400)
const noise = makeNoise(1, count)
const drawdown_m = elapsed_s.map((time, i) => leakyDrawdown(rate, truth, distance, time) + 0.01 * (noise[i] as number))
const place = makePlace({ distance_m: distance })
const problem = curveProblem(leaky, [{ place, elapsed_s, drawdown_m }], [{ start_s: 0, change_m3_s: rate }], false)

let found: number[] = []
const value = medianMilliseconds(repeats, () => {
  found = levenbergMarquardt(problem, { starts: [start] }).parameters
})
const job = { elapsed_s, drawdown_m, rate, distance, start, repeats: repeats / 2 }
const reference = fromPython<{ milliseconds: number; parameters: number[] }>('leaky-fit.py', job)
const apart = Math.max(...found.map((parameter, k) => Math.abs(parameter / (reference.parameters[k] ?? NaN) - 1)))
if (!(apart < 1e-4)) throw new Error(`Different answers: ${found.join(' ')} and ${reference.parameters.join(' ')}`)
report('leaky-fit', 'median time of a fit of 1,000 readings from a start ten times off', value, 'ms', {
  name: "scipy curve_fit (64-point Gauss–Legendre, vectorised, method 'lm', same start)",
  value: reference.milliseconds,
})
