import { describe, expect, it } from 'vitest'
import { numericDerivatives } from '#shared/hydraulics/numeric-derivatives.ts'
import { storativity, transmissivity, type Unknown } from '#shared/hydraulics/method.ts'
import type { ResponsePlace } from '#shared/hydraulics/place.ts'
import { theisDrawdown, theisRespond } from '#shared/hydraulics/theis.ts'

const place: ResponsePlace = {
  pumped: false,
  distance_m: 40,
  bearing_deg: null,
  wellRadius_m: 0.1,
  casingRadius_m: 0.1,
  thickness_m: 20,
  pumpedScreen: null,
  observedScreen: null,
}
const respond = numericDerivatives([transmissivity, storativity], (parameters, { distance_m }) => {
  const [T = NaN, S = NaN] = Array.from(parameters)
  return (time_s) => theisDrawdown(1, T, S, distance_m, time_s)
})

describe('Derivatives of a solution by differences', () => {
  it('equal the analytic ones of the Theis solution to 1e-6', () => {
    const analytic = new Float64Array(3)
    const numeric = new Float64Array(3)
    for (const time of [60, 3600, 1e5]) {
      theisRespond([2e-3, 3e-4], place)(time, analytic)
      respond([2e-3, 3e-4], place)(time, numeric)
      expect(numeric[0]).toBe(analytic[0])
      for (const k of [1, 2]) {
        const scale = Math.abs(analytic[k] as number)
        expect(Math.abs((numeric[k] as number) - (analytic[k] as number))).toBeLessThan(1e-6 * scale)
      }
    }
  })

  it('stay inside the bounds of an unknown, one-sided there', () => {
    const share: Unknown = { id: 'x', label: 'Share', dimension: 'dimensionless', low: 0, high: 1, scale: 'linear' }
    const seen: number[] = []
    const atEdge = numericDerivatives([share], (parameters) => {
      const x = parameters[0] as number
      seen.push(x)
      return () => 3 * x
    })
    const out = new Float64Array(2)
    atEdge([1], place)(60, out)
    expect(Math.max(...seen)).toBe(1)
    expect(out[1]).toBeCloseTo(3, 9)
  })
})
