import { foot, inch, metreOfMercury, metreOfWater, poundForce } from './factors.ts'
import type { Unit } from './unit.ts'

const pressure = (id: string, toSI: number, aliases: string[], source: string, label = id): Unit => ({
  id,
  dimension: 'pressure',
  label,
  toSI,
  aliases,
  source,
})

const water = (length: string) => [`${length} h2o`, `${length} water`, `${length} wc`, `${length} of water`]

export const pressures: Unit[] = [
  pressure('Pa', 1, ['pascal'], 'SI'),
  pressure(
    'hPa',
    1e2,
    ['hectopascal', 'mbar', 'millibar', 'mb'],
    'SI prefix; NIST SP 811 B.8 "millibar (mbar)", exact',
  ),
  pressure('kPa', 1e3, ['kilopascal'], 'SI prefix'),
  pressure('bar', 1e5, ['bars'], 'NIST SP 811 B.8 "bar (bar)", exact'),
  pressure('psi', poundForce / inch ** 2, ['psia', 'psig', 'lbf/in2', 'lb/in2'], 'NIST SP 811 B.8 "psi"'),
  pressure(
    'mmHg',
    metreOfMercury / 1000,
    ['mm hg', 'millimeter of mercury', 'millimetre of mercury'],
    'NIST SP 811 B.8 "millimeter of mercury, conventional (mmHg)"',
  ),
  pressure(
    'inHg',
    metreOfMercury * inch,
    ['in hg', 'inch of mercury', 'inches of mercury'],
    'NIST SP 811 B.8 "inch of mercury, conventional (inHg)"',
  ),
  pressure('mH2O', metreOfWater, water('m'), '100 times NIST SP 811 B.8 "centimeter of water, conventional"', 'm H₂O'),
  pressure(
    'cmH2O',
    metreOfWater / 100,
    water('cm'),
    'NIST SP 811 B.8 "centimeter of water, conventional", exact',
    'cm H₂O',
  ),
  pressure(
    'ftH2O',
    metreOfWater * foot,
    water('ft'),
    'NIST SP 811 B.8 "foot of water, conventional (ftH2O)"',
    'ft H₂O',
  ),
]
