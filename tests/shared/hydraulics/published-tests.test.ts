import { describe, expect, it } from 'vitest'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import { fromSI } from '#shared/quantities/units.ts'
import reference from '../../reference/hydraulics-fits.json'
import { DAY, makeInputs, makeOptions, publishedSeries, relative, valueOf } from './make-inputs.ts'

const foot = 0.3048
const rateOf = (rate_m3_s: number) => [{ start_s: 0, rate_m3_s }]

/**
 * Oude Korendijk, piezometer at 30 m (Kruseman & de Ridder, ILRI Publication 47; readings and results from memory).
 * The handbook's type curve gives 392 m²/d, its straight line 385 m²/d, S about 1.7e-4. Least squares over all readings
 * give more, because late readings flatten (the aquifer leaks) and every reading counts alike, where the eye follows
 * the middle of the curve. A line through 1.4 to 18 min repeats the handbook, though it begins at u near 0.1.
 */
const oudeKorendijk = makeInputs({
  rates: rateOf(788 / DAY),
  series: [publishedSeries('oude-korendijk.csv', 1, 30)],
})

/** Gridley (Walton 1962, Illinois State Water Survey Bulletin 49; from memory): published 10,100 gpd/ft and 2e-5. */
const gridley = makeInputs({
  rates: rateOf((220 * 231 * 0.0254 ** 3) / 60),
  series: [publishedSeries('gridley.csv', foot, 824 * foot)],
})

describe('Oude Korendijk', () => {
  it('gives 480 m²/d and 1.13e-4 by least squares on drawdown, as scipy does', () => {
    const result = analyse('theis', oudeKorendijk, makeOptions())
    expect(fromSI(valueOf(result.T), 'm2/d')).toBeCloseTo(480, -0.5)
    expect(valueOf(result.S)).toBeCloseTo(1.13e-4, 6)
    expect(relative(valueOf(result.T), reference.oudeKorendijk.drawdown.T)).toBeLessThan(1e-7)
    expect(relative(valueOf(result.S), reference.oudeKorendijk.drawdown.S)).toBeLessThan(1e-7)
  })

  it('gives 461 m²/d and 1.37e-4 by least squares on ln drawdown, as scipy does', () => {
    const result = analyse('theis', oudeKorendijk, makeOptions({ objective: 'log-drawdown' }))
    expect(fromSI(valueOf(result.T), 'm2/d')).toBeCloseTo(461, -0.5)
    expect(valueOf(result.S)).toBeCloseTo(1.37e-4, 6)
    expect(relative(valueOf(result.T), reference.oudeKorendijk.logDrawdown.T)).toBeLessThan(1e-7)
    expect(relative(valueOf(result.S), reference.oudeKorendijk.logDrawdown.S)).toBeLessThan(1e-7)
  })

  it('gives 391 m²/d and 1.64e-4 by the line from 1.4 to 18 min, and says that u is too large there', () => {
    const result = analyse('cooper-jacob', oudeKorendijk, makeOptions({ window: { from_s: 84, to_s: 1080 } }))
    const { line } = reference.oudeKorendijk
    expect(fromSI(valueOf(result.T), 'm2/d')).toBeCloseTo(391, -0.5)
    expect(valueOf(result.S)).toBeCloseTo(1.64e-4, 6)
    expect(relative(valueOf(result.T), line.T)).toBeLessThan(1e-10)
    expect(relative(valueOf(result.S), line.S)).toBeLessThan(1e-9)
    const finding = result.findings.find(({ code }) => code === 'u-large')
    expect(finding?.params.u).toBeGreaterThan(0.09)
    expect(finding?.params.u).toBeLessThan(0.11)
  })

  it('stays within a tenth of the handbook where the window does, and says that its readings stray together', () => {
    const line = analyse('cooper-jacob', oudeKorendijk, makeOptions({ window: { from_s: 84, to_s: 1080 } }))
    expect(relative(fromSI(valueOf(line.T), 'm2/d'), 385)).toBeLessThan(0.05)
    expect(relative(valueOf(line.S), 1.7e-4)).toBeLessThan(0.1)
    const curve = analyse('theis', oudeKorendijk, makeOptions())
    expect(curve.fit.effectiveN).toBeLessThan(curve.fit.n / 2)
    expect(curve.findings.map(({ code }) => code)).toContain('residuals-correlated')
  })
})

describe('Gridley', () => {
  it('gives 9,909 gpd/ft and 2.1e-5 by least squares, as scipy does, near the published 10,100 and 2e-5', () => {
    const result = analyse('theis', gridley, makeOptions())
    const gallons = fromSI(valueOf(result.T), 'gpd-us/ft')
    expect(gallons).toBeCloseTo(9909, -0.5)
    expect(valueOf(result.S)).toBeCloseTo(2.1e-5, 6)
    expect(relative(valueOf(result.T), reference.gridley.drawdown.T)).toBeLessThan(1e-7)
    expect(relative(gallons, 10_100)).toBeLessThan(0.02)
    expect(fromSI(result.T?.low ?? NaN, 'gpd-us/ft')).toBeLessThan(10_100)
    expect(fromSI(result.T?.high ?? NaN, 'gpd-us/ft')).toBeGreaterThan(10_100)
  })

  it('gives the late line as linregress does', () => {
    const { line } = reference.gridley
    const result = analyse('cooper-jacob', gridley, makeOptions({ window: { from_s: line.from_s, to_s: line.to_s } }))
    expect(result.fit.n).toBe(line.n)
    expect(relative(valueOf(result.T), line.T)).toBeLessThan(1e-10)
    expect(relative(valueOf(result.S), line.S)).toBeLessThan(1e-9)
  })
})
