import { readFileSync } from 'node:fs'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { unitSystemById, unitSystems } from '#shared/quantities/systems.ts'
import { dimensions, fromSI, isUnitId, toSI, unitById, unitsOf } from '#shared/quantities/units.ts'

interface Factors {
  rational: Record<string, number>
  scipy: Record<string, number>
}
const reference = JSON.parse(
  readFileSync(new URL('../../reference/units-factors.json', import.meta.url), 'utf8'),
) as Factors

const allUnits = dimensions.flatMap(unitsOf)

/** Seven printed digits: half a unit in the last place is at most 5e-7 of the value. */
const asPrinted = 5e-7
const relativeError = (value: number, expected: number) => Math.abs(value / expected - 1)

/*
 * Sources of the factors in this file, and nothing else is used:
 * - NIST SP 811 (2008), Appendix B.8, printed to seven digits, by its entry. `read`: seen in public transcriptions of
 *   the table (the SysML v2 library of US customary units, the R package NISTunits); `from memory`: recalled, not read.
 * - NIST SP 811 (2008), Appendix B.6: the survey foot is 1200/3937 m, so 2.000004 parts in a million longer than the
 *   foot; Table 6 and 7.10.2: minute, hour, day, litre, per cent. From memory.
 * - The gallons by their definitions, 231 cubic inches and 4.546 09 L; 1728 cubic inches in a cubic foot; the acre of
 *   43 560 square survey feet; standard gravity 9.806 65 m/s²; the pound of 0.453 592 37 kg; conventional water of
 *   1000 kg/m³, mercury of 13 595.1 kg/m³. From memory; units-factors.py composes every unit from these in exact rational arithmetic.
 * - scipy.constants (version in units-factors.json), for every unit that it has.
 */

/** By entry of NIST SP 811, B.8. */
const printed: [unit: string, entry: string, factor: number, how: 'read' | 'from memory'][] = [
  ['ft', 'foot (ft)', 3.048e-1, 'read'],
  ['ft-us', 'foot (U.S. survey) (ft)', 3.048006e-1, 'read'],
  ['in', 'inch (in)', 2.54e-2, 'read'],
  ['gpm-us', 'gallon (U.S.) per minute (gpm)', 6.30902e-5, 'read'],
  ['ft3/min', 'cubic foot per minute (ft³/min)', 4.719474e-4, 'read'],
  ['psi', 'psi (pound-force per square inch)', 6.894757e3, 'read'],
  ['ftH2O', 'foot of water, conventional (ftH2O)', 2.989067e3, 'read'],
  ['ft3/s', 'cubic foot per second (ft³/s)', 2.831685e-2, 'read'],
  ['cmH2O', 'centimeter of water, conventional (cmH2O)', 9.80665e1, 'from memory'],
  ['mmHg', 'millimeter of mercury, conventional (mmHg)', 1.333224e2, 'from memory'],
  ['inHg', 'inch of mercury, conventional (inHg)', 3.386389e3, 'from memory'],
  ['bar', 'bar (bar)', 1e5, 'from memory'],
  ['hPa', 'millibar (mbar)', 1e2, 'from memory'],
  ['min', 'minute (min)', 60, 'from memory'],
  ['h', 'hour (h)', 3600, 'from memory'],
  ['d', 'day (d)', 86400, 'from memory'],
]

/** Entries that are a factor of a unit here: the printed volume or rate, divided as the unit says. */
const composed: [unit: string, factor: number, how: string][] = [
  ['gpm-imp', 4.54609e-3 / 60, 'gallon [Canadian and U.K. (Imperial)], from memory'],
  ['MGD-us', 4.381264e-8 * 1e6, 'gallon (U.S.) per day, read'],
  ['gpd-us/ft', 4.381264e-8 / 3.048e-1, 'gallon (U.S.) per day, read; foot'],
  ['gpd-us/ft2', 4.381264e-8 / 9.290304e-2, 'gallon (U.S.) per day, read; square foot, from memory'],
  ['ft2/d', 9.290304e-2 / 86400, 'square foot, from memory; day'],
  ['acre-ft/d', 1.233489e3 / 86400, 'acre foot, read; day'],
  ['gpm-us/ft', 6.30902e-5 / 3.048e-1, 'gallon (U.S.) per minute, read; foot'],
]

describe('unit factors', () => {
  it.each(printed)('%s agrees with NIST SP 811 B.8 "%s", %d (%s)', (unit, _entry, factor) => {
    expect(relativeError(unitById(unit).toSI, factor)).toBeLessThan(asPrinted)
  })

  it.each(composed)('%s agrees with its parts in NIST SP 811, %d (%s)', (unit, factor) => {
    expect(relativeError(unitById(unit).toSI, factor)).toBeLessThan(asPrinted)
  })

  it('equal the composition in exact rational arithmetic, for every unit of the catalogue', () => {
    expect(Object.keys(reference.rational).sort()).toEqual(allUnits.map((unit) => unit.id).sort())
    for (const unit of allUnits) {
      expect(relativeError(unit.toSI, reference.rational[unit.id] ?? NaN), unit.id).toBeLessThan(1e-15)
    }
  })

  it('equal the constants of scipy where it has them', () => {
    const entries = Object.entries(reference.scipy)
    expect(entries.length).toBeGreaterThan(10)
    for (const [id, factor] of entries) expect(relativeError(unitById(id).toSI, factor), id).toBeLessThan(1e-15)
  })

  it('keep the US survey foot 2 parts in a million longer than the foot', () => {
    expect(unitById('ft-us').toSI / unitById('ft').toSI - 1).toBeCloseTo(2.000004e-6, 12)
  })

  it('count 1728/231 US gallons in a cubic foot, whichever unit says it', () => {
    const gallons = 1728 / 231
    expect(relativeError(toSI(gallons, 'gpd-us/ft'), toSI(1, 'ft2/d'))).toBeLessThan(1e-14)
    expect(relativeError(toSI(gallons, 'gpd-us/ft2'), toSI(1, 'ft/d'))).toBeLessThan(1e-14)
    expect(relativeError(toSI(gallons, 'gpm-us'), toSI(1, 'ft3/min'))).toBeLessThan(1e-14)
  })
})

describe('the catalogue', () => {
  it('gives every unit an id of its own, a source and a positive factor', () => {
    expect(new Set(allUnits.map((unit) => unit.id)).size).toBe(allUnits.length)
    for (const unit of allUnits) {
      expect(unit.source).not.toBe('')
      expect(unit.toSI).toBeGreaterThan(0)
    }
  })

  it('converts there and back without loss', () => {
    const anyUnit = fc.constantFrom(...allUnits)
    fc.assert(
      fc.property(anyUnit, fc.double({ min: 1e-12, max: 1e12, noNaN: true }), (unit, value) => {
        const back = fromSI(toSI(value, unit.id), unit.id)
        expect(relativeError(back, value)).toBeLessThanOrEqual(3e-16)
      }),
    )
  })

  it('refuses an id that it does not have', () => {
    expect(() => unitById('furlong')).toThrow(RangeError)
    expect(() => toSI(1, '')).toThrow(RangeError)
    expect(() => fromSI(1, 'gpm')).toThrow(RangeError)
  })

  it('tells whether a text is an id, also within a dimension', () => {
    expect(isUnitId('m2/d')).toBe(true)
    expect(isUnitId('m2/d', 'length')).toBe(false)
    expect(isUnitId('gpm')).toBe(false)
  })
})

describe('unit systems', () => {
  it('name a unit of the right dimension for every dimension', () => {
    for (const system of unitSystems) {
      for (const dimension of dimensions) expect(unitById(system[dimension]).dimension).toBe(dimension)
    }
  })

  it('fall back to the metric system for an id that no longer exists', () => {
    expect(unitSystemById('us').transmissivity).toBe('ft2/d')
    expect(unitSystemById('cubits').id).toBe('metric')
  })
})
