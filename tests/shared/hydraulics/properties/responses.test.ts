import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { boundedSolution } from '#shared/hydraulics/boundaries/bounded-solution.ts'
import { placeOf, type ResponsePlace } from '#shared/hydraulics/place.ts'
import { curveTests, type CurveTest } from '../intervals/curve-tests.ts'
import { relative } from '../make-inputs.ts'
import { rescaledBoundary, rescaledParameters, rescaledPlace } from './rescaled.ts'

const RUNS = { numRuns: 25 }
const factor = (most: number) => fc.double({ min: -1, max: 1, noNaN: true }).map((power) => most ** power)
const time = fc.double({ min: 1.5, max: 5.5, noNaN: true }).map((power) => 10 ** power)

/** Solved in Laplace space: good to 1e-6 of the value, or 1e-9/(4πT) if that is more. */
const errorOf = ({ laplace = false }: CurveTest, T: number, value: number) =>
  laplace ? 1e-6 * value + 1e-9 / (4 * Math.PI * T) : 1e-9 * value

const solutionOf = ({ solution, boundaries = [] }: CurveTest) => boundedSolution(solution, boundaries)

function drawdown(test: CurveTest, parameters: number[], place: ResponsePlace, time_s: number): number {
  const out = new Float64Array(parameters.length + 1)
  solutionOf(test).respond(parameters, place)(time_s, out)
  return out[0] as number
}

/** The place of the last well of a test: never the pumped one. */
const observed = ({ inputs }: CurveTest) => placeOf(inputs.series.at(-1)!, inputs)
const moved = (parameters: number[], factors: number[]) => parameters.map((value, k) => value * (factors[k] as number))
const factors = ({ parameters }: CurveTest) =>
  fc.array(factor(3), { minLength: parameters.length, maxLength: parameters.length })

const tests = curveTests(false)
const named = tests.map((test) => [test.id ?? test.solution.id, test] as const)
/** A stream takes drawdown back. */
const spreading = named.filter(([id]) => id !== 'stream')

describe('Drawdown per unit rate of every solution', () => {
  it.each(named)('is the same in whatever units lengths and times are counted: %s', (_, test) => {
    fc.assert(
      fc.property(factors(test), time, factor(10), factor(60), (changes, time_s, length, seconds) => {
        const units = { length, time: seconds }
        const here = moved(test.parameters, changes)
        const value = drawdown(test, here, observed(test), time_s)
        const there = rescaledParameters(here, solutionOf(test).unknowns, units)
        const boundaries = (test.boundaries ?? []).map((boundary) => rescaledBoundary(boundary, units))
        const again = drawdown({ ...test, boundaries }, there, rescaledPlace(observed(test), units), time_s * seconds)
        const error = errorOf(test, here[0] as number, value)
        expect(Math.abs((again * length ** 2) / seconds - value)).toBeLessThanOrEqual(error)
      }),
      RUNS,
    )
  })

  it.each(spreading)('grows with time while pumping goes on: %s', (_, test) => {
    fc.assert(
      fc.property(factors(test), time, factor(10), (changes, time_s, later) => {
        const here = moved(test.parameters, changes)
        const [early, late] = [time_s, time_s * Math.max(later, 1 / later)]
        const before = drawdown(test, here, observed(test), early)
        const after = drawdown(test, here, observed(test), late)
        expect(after).toBeGreaterThanOrEqual(before - errorOf(test, here[0] as number, before))
      }),
      RUNS,
    )
  })

  it.each(named.filter(([, { boundaries }]) => !boundaries))('falls with distance: %s', (_, test) => {
    fc.assert(
      fc.property(factors(test), time, factor(4), (changes, time_s, ratio) => {
        const here = moved(test.parameters, changes)
        const place = observed(test)
        const near = drawdown(test, here, place, time_s)
        const far = { ...place, distance_m: place.distance_m * Math.max(ratio, 1 / ratio) }
        expect(drawdown(test, here, far, time_s)).toBeLessThanOrEqual(near + errorOf(test, here[0] as number, near))
      }),
      RUNS,
    )
  })

  it.each(named)('becomes the inverse of T when storage, time and all else follow T: %s', (_, test) => {
    // T·s depends on T·t and the storages alone: T twice as high at half the time gives half the drawdown.
    fc.assert(
      fc.property(factors(test), time, factor(5), (changes, time_s, ratio) => {
        const here = moved(test.parameters, changes)
        const value = drawdown(test, here, observed(test), time_s)
        const faster = here.map((parameter, k) => (k === 0 ? parameter * ratio : parameter))
        const again = drawdown(test, faster, observed(test), time_s / ratio)
        if (!(value > 0)) return
        const allowed = errorOf(test, here[0] as number, value) / value
        expect(relative(again * ratio, value)).toBeLessThanOrEqual(allowed)
      }),
      RUNS,
    )
  })
})
