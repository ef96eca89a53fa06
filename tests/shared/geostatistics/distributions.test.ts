import { describe, expect, it } from 'vitest'
import { binomialTest, normalProbability, studentDensity } from '#shared/geostatistics/distributions.ts'
import { mixtureProbability, mixtureQuantile, type Component } from '#shared/geostatistics/mixture.ts'
import { logGamma } from '#shared/numerics/gamma-beta.ts'
import { studentCdf } from '#shared/numerics/student.ts'
import scipy from '../../reference/distributions.json'

describe('distributions beside scipy (fixtures: distributions.py)', () => {
  it.each(scipy.normal)('gives the normal probability below $x', ({ x, p }) => {
    expect(Math.abs(normalProbability(x) - p)).toBeLessThan(1e-14)
  })

  it.each(scipy.student)("gives Student's t with $df degrees of freedom at $x", ({ x, df, p, density }) => {
    expect(Math.abs(studentCdf(x, df) - p)).toBeLessThan(1e-12)
    expect(Math.abs(studentDensity(x, df) / density - 1)).toBeLessThan(1e-11)
  })

  it.each(scipy.logGamma)('gives ln Γ($x)', ({ x, value }) => {
    expect(Math.abs(logGamma(x) - value)).toBeLessThan(1e-12 * Math.max(1, Math.abs(value)))
  })

  it.each(scipy.binomial)('gives the exact binomial test of $k in $n at $p', ({ k, n, p, value }) => {
    expect(Math.abs(binomialTest(k, n, p) - value)).toBeLessThan(1e-10)
  })
})

const normal = (mean: number, sd: number, weight = 1): Component => ({ weight, mean, sd, df: null })

describe('mixtures', () => {
  it('have the quantiles of a normal distribution when there is one part', () => {
    // 1.959963984540054 is the 97.5 % point (any printed table; here to double precision from scipy).
    expect(mixtureQuantile([normal(2, 3)], 0.975)).toBeCloseTo(2 + 3 * 1.959963984540054, 11)
  })

  it("have the quantiles of Student's t when there is one such part", () => {
    // t(0.975; 4) = 2.7764451051977987, scipy.stats.t.ppf
    expect(mixtureQuantile([{ weight: 1, mean: 0, sd: 1, df: 4 }], 0.975)).toBeCloseTo(2.7764451051977987, 9)
  })

  it.each([0.001, 0.025, 0.3, 0.5, 0.9, 0.999])('return the share they were asked for, %s', (p) => {
    const parts = [normal(-3, 0.1, 0.2), normal(-2.5, 0.4, 0.5), { weight: 0.3, mean: -2, sd: 0.2, df: 3 }]
    expect(mixtureProbability(parts, mixtureQuantile(parts, p))).toBeCloseTo(p, 10)
  })

  it('step at a part without spread', () => {
    expect(mixtureQuantile([normal(5, 0)], 0.3)).toBe(5)
    expect(mixtureProbability([normal(5, 0)], 4.99)).toBe(0)
  })

  it('refuse shares outside 0 to 1 and an empty list', () => {
    expect(() => mixtureQuantile([normal(0, 1)], 1)).toThrow()
    expect(() => mixtureQuantile([], 0.5)).toThrow()
  })
})

describe('limits', () => {
  it('are kept by the normal distribution far out', () => {
    expect(normalProbability(40)).toBe(1)
    expect(normalProbability(-40)).toBe(0)
  })

  it('are kept by the binomial test', () => {
    expect(binomialTest(5, 10, 0.5)).toBe(1)
    expect(() => binomialTest(11, 10, 0.5)).toThrow()
  })
})
