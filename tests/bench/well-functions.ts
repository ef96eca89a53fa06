import { exponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import { leakyWellFunction } from '#shared/numerics/leaky-well-function.ts'
import { fromPython, medianMilliseconds, report } from '../support/bench.ts'
import { logSpaced } from '../shared/hydraulics/make-inputs.ts'

/** Evaluations of W(u) and W(u, r/B) per second, beside scipy's exp1 and a vectorised 64-point Gauss–Legendre. */
const [count, low, high, rho] = [200_000, 1e-6, 5, 0.2]
const u = logSpaced(count, low, high)

interface Rate {
  perSecond: number
  sum: number
}
const reference = fromPython<{ confined: Rate; leaky: Rate }>('well-functions.py', { count, low, high, rho })

function compare(name: string, { perSecond, sum }: Rate, theirs: string, total: () => number): void {
  let found = Number.NaN
  const spent = medianMilliseconds(5, () => {
    found = total()
  })
  if (!(Math.abs(found / sum - 1) < 1e-6)) throw new Error(`Different sums of ${name}: ${found} and ${sum}`)
  const value = (1000 * count) / spent
  report('well-functions', `evaluations of ${name}, more is better`, value, '1/s', { name: theirs, value: perSecond })
}

compare('W(u)', reference.confined, 'scipy exp1, vectorised', () =>
  u.reduce((sum, value) => sum + exponentialIntegral(value), 0),
)
compare('W(u, r/B) with derivatives', reference.leaky, '64-point Gauss–Legendre, vectorised, no derivatives', () => {
  const evaluate = leakyWellFunction(rho)
  const values = new Float64Array(3)
  return u.reduce((sum, value) => {
    evaluate(value, values)
    return sum + (values[0] as number)
  }, 0)
})
