import { readFileSync } from 'node:fs'
import type { AnalysisInputs, AnalysisOptions, RateStep, Series } from '#shared/hydraulics/analysis.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'
import { drawdownHistory } from '#shared/hydraulics/superposition.ts'
import { theisRespond } from '#shared/hydraulics/theis.ts'

export const DAY = 86_400

export function logSpaced(count: number, from: number, to: number): number[] {
  return Array.from({ length: count }, (_, i) => from * (to / from) ** (i / (count - 1)))
}

export function makeSeries(overrides: Partial<Series> = {}): Series {
  const elapsed_s = overrides.elapsed_s ?? logSpaced(40, 60, DAY)
  return {
    wellId: 'o1',
    label: 'OB-1',
    role: 'observation',
    distance_m: 50,
    distanceSd_m: 0,
    wellRadius_m: null,
    casingRadius_m: null,
    elapsed_s,
    drawdown_m: elapsed_s.map(() => 1),
    included: elapsed_s.map(() => true),
    ...overrides,
  }
}

export function makeInputs(overrides: Partial<AnalysisInputs> = {}): AnalysisInputs {
  return {
    version: 1,
    rates: [{ start_s: 0, rate_m3_s: 0.01 }],
    rateError: 0,
    series: [makeSeries()],
    aquifer: 'confined',
    thickness_m: null,
    thicknessBasis: 'unknown',
    thicknessError: 0,
    streamDistance_m: null,
    ...overrides,
  }
}

export function makeOptions(overrides: Partial<AnalysisOptions> = {}): AnalysisOptions {
  return { wellIds: ['o1'], window: null, ...overrides }
}

export interface Truth {
  T: number
  S: number
}

/** A series whose drawdowns are exactly Theis under the rates, plus noise where given. */
export function makeTheisSeries(
  { T, S }: Truth,
  { rates = makeInputs().rates, noise, ...overrides }: Partial<Series> & { rates?: RateStep[]; noise?: number[] } = {},
): Series {
  const series = makeSeries(overrides)
  const distance = series.role === 'pumped' ? (series.wellRadius_m ?? 0.1) : series.distance_m
  const times = series.elapsed_s.map((time) => (Number.isFinite(time) ? time : 0))
  const exact = drawdownHistory(theisRespond([T, S], { distance_m: distance }), 2, rateHistory(rates).increments, times)
  return { ...series, drawdown_m: exact.map((value, i) => value + (noise?.[i] ?? 0)) }
}

/** One of the published logs beside the reference scripts; comment lines, a header, then time in minutes. */
export function publishedSeries(file: string, lengthUnit: number, distance_m: number): Series {
  const text = readFileSync(new URL(`../../reference/${file}`, import.meta.url), 'utf8')
  const rows = text
    .trim()
    .split('\n')
    .filter((line) => !line.startsWith('#'))
    .slice(1)
    .map((line) => line.split(',').map(Number) as [number, number])
  return makeSeries({
    distance_m,
    elapsed_s: rows.map(([minutes]) => minutes * 60),
    drawdown_m: rows.map(([, drawdown]) => drawdown * lengthUnit),
    included: rows.map(() => true),
  })
}

/** A parameter of the result, which must be there. */
export const valueOf = (estimate: { value: number } | null) => estimate?.value ?? NaN

export const relative = (value: number, expected: number) => Math.abs(value / expected - 1)
