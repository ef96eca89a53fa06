import { spawnSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { curveProblem } from '#shared/hydraulics/curve-problem.ts'
import type { ResponsePlace } from '#shared/hydraulics/place.ts'
import { theis, theisDrawdown } from '#shared/hydraulics/theis.ts'
import { levenbergMarquardt } from '#shared/numerics/levenberg-marquardt.ts'
import { makeNoise } from '../shared/numerics/make-noise.ts'

/** One Theis fit of 1,000 noisy readings, beside scipy's curve_fit from the same start on the same readings. */
const [rate, distance, T, S, count, repeats] = [0.01, 50, 5e-3, 2e-4, 1000, 200]
const start = [1e-3, 1e-3]
const elapsed_s = Array.from({ length: count }, (_, i) => 60 * 1440 ** (i / (count - 1)))
const noise = makeNoise(1, count)
const drawdown_m = elapsed_s.map((time, i) => theisDrawdown(rate, T, S, distance, time) + 0.01 * (noise[i] as number))

const place: ResponsePlace = {
  pumped: false,
  distance_m: distance,
  bearing_deg: null,
  wellRadius_m: null,
  casingRadius_m: null,
  thickness_m: null,
  pumpedScreen: null,
  observedScreen: null,
}
const problem = curveProblem(theis, [{ place, elapsed_s, drawdown_m }], [{ start_s: 0, change_m3_s: rate }], false)
const spent: number[] = []
let found = Number.NaN
for (let i = 0; i < 2 * repeats; i++) {
  const begin = performance.now()
  found = levenbergMarquardt(problem, { starts: [start] }).parameters[0] as number
  // The first half warms the compiler up.
  if (i >= repeats) spent.push(performance.now() - begin)
}
const value = spent.sort((a, b) => a - b)[repeats / 2] as number

const script = fileURLToPath(new URL('theis-fit.py', import.meta.url))
const job = JSON.stringify({ elapsed_s, drawdown_m, rate, distance, start, repeats })
const scipy = spawnSync('/usr/bin/python3', [script], { input: job, encoding: 'utf8', maxBuffer: 1e8 })
if (scipy.status !== 0) throw new Error(`scipy could not be run: ${scipy.stderr || scipy.error?.message}`)
const reference = JSON.parse(scipy.stdout) as { milliseconds: number; T: number }
if (!(Math.abs(found / reference.T - 1) < 1e-6)) throw new Error(`Different answers: T ${found} and ${reference.T}`)

console.log(
  JSON.stringify({
    bench: 'theis-fit',
    metric: 'median time of a fit of 1,000 readings',
    value,
    unit: 'ms',
    reference: "scipy curve_fit (exp1, method 'lm', same start)",
    referenceValue: reference.milliseconds,
    ratio: value / reference.milliseconds,
  }),
)
