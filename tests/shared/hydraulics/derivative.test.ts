import fc from 'fast-check'
import { describe, expect, it, vi } from 'vitest'
import { logDerivative } from '#shared/hydraulics/derivative.ts'
import { radialFlowSpan } from '#shared/hydraulics/radial-flow.ts'
import { theisU } from '#shared/hydraulics/small-u.ts'
import { theisDrawdown } from '#shared/hydraulics/theis.ts'
import { makeNoise } from '../numerics/make-noise.ts'
import { DAY, logSpaced } from './make-inputs.ts'

vi.setConfig({ testTimeout: 60_000 })

const times = logSpaced(200, 10, 10 * DAY)

describe('log-derivative', () => {
  it('is the slope of a straight line, whatever the smoothing', () => {
    const slope = fc.double({ min: -3, max: 3, noNaN: true })
    const smoothing = fc.double({ min: 0, max: 0.6, noNaN: true })
    fc.assert(
      fc.property(slope, smoothing, (m, L) => {
        const points = logDerivative(
          times,
          times.map((t) => 2 + m * Math.log(t)),
          { smoothing: L },
        )
        expect(points.length).toBeGreaterThan(100)
        for (const { derivative_m } of points) expect(derivative_m).toBeCloseTo(m, 9)
      }),
    )
  })

  it('is exact for a parabola in ln t', () => {
    const points = logDerivative(
      times,
      times.map((t) => Math.log(t) ** 2),
    )
    for (const { time_s, derivative_m } of points) expect(derivative_m).toBeCloseTo(2 * Math.log(time_s), 8)
  })

  it('follows Q·e^-u/(4πT) for Theis', () => {
    const [T, S, r, Q] = [5e-3, 2e-4, 50, 0.01]
    for (const { time_s, derivative_m } of logDerivative(
      times,
      times.map((t) => theisDrawdown(Q, T, S, r, t)),
    )) {
      const exact = (Q / (4 * Math.PI * T)) * Math.exp(-theisU(T, S, r, time_s))
      expect(Math.abs(derivative_m - exact)).toBeLessThan((0.05 * Q) / (4 * Math.PI * T))
    }
  })

  it('is steadier with more smoothing', () => {
    const noisy = makeNoise(1, times.length).map((value, i) => Math.log(times[i] as number) + 0.05 * value)
    const spread = (smoothing: number) => {
      const values = logDerivative(times, noisy, { smoothing }).map(({ derivative_m }) => derivative_m - 1)
      return Math.sqrt(values.reduce((sum, value) => sum + value * value, 0) / values.length)
    }
    expect(spread(0.3)).toBeLessThan(0.4 * spread(0.05))
  })

  it('passes over readings at one moment and gives nothing for too few', () => {
    const points = logDerivative([1, 2, 2, 4, 8], [0, 1, 1, 2, 3], { smoothing: 0 })
    for (const { derivative_m } of points) expect(derivative_m).toBeCloseTo(1 / Math.LN2, 12)
    expect(logDerivative([1, 2], [0, 1])).toEqual([])
    expect(logDerivative([], [])).toEqual([])
  })

  it('refuses series of unequal length and a negative smoothing', () => {
    expect(() => logDerivative([1, 2], [1])).toThrow(RangeError)
    expect(() => logDerivative([1], [1], { smoothing: -1 })).toThrow(RangeError)
  })
})

describe('radial flow', () => {
  it('is the level part of a Theis derivative, from u near 0.1 on', () => {
    const [T, S, r] = [5e-3, 2e-4, 50]
    const span = radialFlowSpan(
      logDerivative(
        times,
        times.map((t) => theisDrawdown(0.01, T, S, r, t)),
      ),
    )
    expect(theisU(T, S, r, span?.from_s ?? NaN)).toBeLessThan(0.35)
    expect(theisU(T, S, r, span?.from_s ?? NaN)).toBeGreaterThan(0.05)
    expect(span?.to_s).toBeGreaterThan(5 * DAY)
  })

  it('is not seen where the derivative rises, falls to zero, or is level only briefly', () => {
    const rising = times.map((t) => t / 1000)
    expect(radialFlowSpan(logDerivative(times, rising))).toBeNull()
    expect(
      radialFlowSpan(
        logDerivative(
          times,
          times.map(() => 1),
        ),
      ),
    ).toBeNull()
    const brief = logSpaced(10, 100, 200)
    expect(radialFlowSpan(logDerivative(brief, brief.map(Math.log), { smoothing: 0 }))).toBeNull()
  })
})
