import { describe, expect, it } from 'vitest'
import { recogniseUnit } from '#shared/quantities/recognise.ts'
import { dimensions, unitsOf, type Dimension } from '#shared/quantities/units.ts'

const idsOf = (text: string, dimension: Dimension) => {
  const found = recogniseUnit(text, dimension)
  if ('unit' in found) return found.unit.id
  return 'ambiguous' in found ? found.ambiguous.map((unit) => unit.id) : 'unknown'
}

describe('recogniseUnit', () => {
  it.each(['m²/d', 'm2/d', 'm^2/day', 'm² d⁻¹', 'M2/D', '(m2/day)', 'm2 per day', 'm³/d/m', 'm3/(d·m)'])(
    'reads %s as square metres per day',
    (text) => expect(idsOf(text, 'transmissivity')).toBe('m2/d'),
  )

  it.each(['L/s', 'l/s', 'lps', 'L·s⁻¹', 'l s-1', 'l.s⁻¹', 'litres per second', 'Liters/sec'])(
    'reads %s as litres per second',
    (text) => expect(idsOf(text, 'discharge')).toBe('L/s'),
  )

  it.each(['US gpm', 'gpm (US)', 'usgpm', 'U.S. gallons per minute', 'US gal/min', 'gal (US)/min'])(
    'reads %s as US gallons per minute',
    (text) => expect(idsOf(text, 'discharge')).toBe('gpm-us'),
  )

  it.each(['igpm', 'imp gpm', 'Imperial gpm', 'UK gal/min', 'gpm (imp)'])(
    'reads %s as imperial gallons per minute',
    (text) => expect(idsOf(text, 'discharge')).toBe('gpm-imp'),
  )

  it.each([
    ['gpm', 'discharge', ['gpm-us', 'gpm-imp']],
    ['gal/min', 'discharge', ['gpm-us', 'gpm-imp']],
    ['gallons per minute', 'discharge', ['gpm-us', 'gpm-imp']],
    ['MGD', 'discharge', ['MGD-us', 'MGD-imp']],
    ['gpd/ft', 'transmissivity', ['gpd-us/ft', 'gpd-imp/ft']],
    ['gal/day/ft', 'transmissivity', ['gpd-us/ft', 'gpd-imp/ft']],
    ['gpd/ft²', 'conductivity', ['gpd-us/ft2', 'gpd-imp/ft2']],
    ['gpm/ft', 'specificCapacity', ['gpm-us/ft', 'gpm-imp/ft']],
  ] as const)('asks which gallon %s means', (text, dimension, ids) => {
    expect(idsOf(text, dimension)).toEqual(ids)
  })

  it.each([
    ['ft', 'ft'],
    ['feet', 'ft'],
    ["'", 'ft'],
    ['US survey ft', 'ft-us'],
    ['in', 'in'],
    ['mm', 'mm'],
    ['metres', 'm'],
  ])('reads the length %s as %s', (text, id) => expect(idsOf(text, 'length')).toBe(id))

  it.each([
    ['m H₂O', 'mH2O'],
    ['cmH2O', 'cmH2O'],
    ['mbar', 'hPa'],
    ['PSI', 'psi'],
    ['kpa', 'kPa'],
  ])('reads the pressure %s as %s', (text, id) => expect(idsOf(text, 'pressure')).toBe(id))

  it('keeps megalitres and millilitres apart', () => {
    expect(idsOf('ML/d', 'discharge')).toBe('ML/d')
    expect(idsOf('ml/d', 'discharge')).toBe('unknown')
  })

  it.each(['', '   ', 'm2', 'furlong', '__proto__', 'm/s'])('does not know %j as a transmissivity', (text) => {
    expect(idsOf(text, 'transmissivity')).toBe('unknown')
  })

  it('recognises every unit by its own id and label', () => {
    for (const unit of dimensions.flatMap(unitsOf)) {
      expect(idsOf(unit.id, unit.dimension)).toBe(unit.id)
      if (unit.label !== '') expect(idsOf(unit.label, unit.dimension)).toBe(unit.id)
    }
  })
})
