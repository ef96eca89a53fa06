import { describe, expect, it } from 'vitest'
import { straightLine } from '#shared/hydraulics/straight-line.ts'
import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import type { AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import { analyse } from '#shared/hydraulics/catalogue.ts'

const times = Array.from({ length: 40 }, (_, i) => 60 * (i + 1))
const lineThrough = (drawdown: number[]) => straightLine(times.map(Math.log10), drawdown, { time_s: times })

describe('a straight line through a level log', () => {
  it.each([0.1, 0.5, 1 / 3, 7.77])(
    'is refused at a drawdown of %s m, whatever rounding makes of its slope',
    (level) => {
      expect(() => lineThrough(times.map(() => level))).toThrow(
        expect.objectContaining({ code: 'analysis/slope-not-positive' }),
      )
    },
  )

  it('is found where drawdown rises by a millimetre in a hundred metres', () => {
    const line = lineThrough(times.map((time) => 100 + 0.001 * Math.log10(time)))
    expect(line.slope).toBeCloseTo(0.001, 9)
  })
})

describe('a method on a level log', () => {
  const series = {
    wellId: '2',
    label: 'OB-2',
    role: 'observation' as const,
    distance_m: 30,
    distanceSd_m: 0.1,
    wellRadius_m: 0.05,
    casingRadius_m: 0.05,
    elapsed_s: times,
    drawdown_m: times.map(() => 1),
    included: times.map(() => true),
  }
  const inputs: AnalysisInputs = {
    version: 1,
    rates: [{ start_s: 0, rate_m3_s: 0.012 }],
    rateError: 0.05,
    series: [series],
    aquifer: 'confined',
    thickness_m: null,
    thicknessBasis: 'unknown',
    thicknessError: 0.1,
    streamDistance_m: null,
  }

  it('is refused in words by the line, also when the program proposes the window', () => {
    expect(() => analyse('cooper-jacob', inputs, { wellIds: ['2'], window: null })).toThrow(AnalysisError)
  })
})
