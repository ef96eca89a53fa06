import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { classIndex, valueClasses } from '#shared/charts/value-classes.ts'
import { unitSystems } from '#shared/quantities/systems.ts'
import { fromSI, toSI } from '#shared/quantities/units.ts'
import { parameterList, parameters, type ParameterId } from '#shared/words/parameters.ts'

const unitOf = (id: ParameterId, system: (typeof unitSystems)[number]) => system[parameters[id].dimension]
const every = parameterList.flatMap(({ id }) => unitSystems.map((system) => [id, unitOf(id, system)] as const))

/** Relative luminance by WCAG 2.2, "relative luminance". */
function luminance(hex: string): number {
  const [r, g, b] = [1, 3, 5].map((at) => {
    const share = parseInt(hex.slice(at, at + 2), 16) / 255
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4
  }) as [number, number, number]
  return 0.2126 * r + 0.7152 * g + 0.0722 * b
}

describe('value classes', () => {
  it('has seven classes for transmissivity and conductivity, six for storage', () => {
    expect(valueClasses('T', 'm2/d').classes).toHaveLength(7)
    expect(valueClasses('K', 'm/d').classes).toHaveLength(7)
    expect(valueClasses('S', '1').classes).toHaveLength(6)
    expect(valueClasses('Sy', '1').classes).toHaveLength(6)
  })

  it('breaks transmissivity at half-decades from 10 m²/d', () => {
    const { breaks, labels } = valueClasses('T', 'm2/d')
    expect(breaks.map((value) => fromSI(value, 'm2/d'))).toEqual(
      [10, 30, 100, 300, 1000, 3000].map((value) => expect.closeTo(value, 9)),
    )
    expect(labels).toEqual(['10', '30', '100', '300', '1\u202f000', '3\u202f000'])
  })

  it.each(every)('breaks %s at round numbers in %s', (id, unit) => {
    for (const limit of valueClasses(id, unit).breaks) {
      const shown = Number(fromSI(limit, unit).toPrecision(12))
      const digits = Number(shown.toExponential().split('e')[0])
      expect([1, 1.5, 2, 3, 5]).toContain(digits)
    }
  })

  it.each(every)('keeps the breaks of %s in %s within half a decade of the usual ones', (id, unit) => {
    const usual = valueClasses(id, { T: 'm2/d', K: 'm/d', S: '1', Sy: '1' }[id]).breaks
    for (const [i, limit] of valueClasses(id, unit).breaks.entries()) {
      expect(Math.abs(Math.log10(limit / usual[i]!))).toBeLessThan(0.5)
    }
  })

  it.each(every)('puts every value of %s in %s into the class whose limits hold it', (id, unit) => {
    const classes = valueClasses(id, unit)
    fc.assert(
      fc.property(fc.double({ min: 1e-12, max: 1e3, noNaN: true }), (value) => {
        const { from, to } = classes.classes[classIndex(classes, value)]!
        expect(from === null || value >= from).toBe(true)
        expect(to === null || value < to).toBe(true)
      }),
    )
  })

  it('puts a value on a break into the class above', () => {
    const classes = valueClasses('T', 'm2/d')
    expect(classIndex(classes, toSI(30, 'm2/d'))).toBe(2)
    expect(classIndex(classes, toSI(29.999, 'm2/d'))).toBe(1)
  })

  it.each(parameterList.map(({ id }) => id))(
    'reads in greyscale: each colour of %s is darker than the one before',
    (id) => {
      const shades = valueClasses(id, unitOf(id, unitSystems[0]!)).classes.map(({ colour }) => luminance(colour))
      for (const [i, shade] of shades.entries()) if (i > 0) expect(shade).toBeLessThan(shades[i - 1]!)
    },
  )

  it('gives storage another hue than transmissivity', () => {
    const colours = (id: ParameterId, unit: string) => valueClasses(id, unit).classes.map(({ colour }) => colour)
    expect(colours('S', '1').filter((colour) => colours('T', 'm2/d').includes(colour))).toEqual([])
  })

  it('refuses a unit that it does not know', () => {
    expect(() => valueClasses('T', 'furlong')).toThrow(RangeError)
  })
})
