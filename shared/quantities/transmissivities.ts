import { day, foot, gallonImperial, gallonUS, hour, minute } from './factors.ts'
import * as word from './spellings.ts'
import type { Unit } from './unit.ts'

const transmissivity = (id: string, label: string, toSI: number, aliases: string[], source: string): Unit => ({
  id,
  dimension: 'transmissivity',
  label,
  toSI,
  aliases,
  source,
})

const overFoot = (spellings: string[]) => word.ratio(spellings, word.feet)

/** A volume over time and length, as some reports write it: m³/d/m is m²/d. */
const cubic = (time: string[]) => word.ratio(word.ratio(word.cubicMetres, time), word.metre)

export const transmissivities: Unit[] = [
  transmissivity('m2/s', 'm²/s', 1, [...word.ratio(word.squareMetres, word.seconds), ...cubic(word.seconds)], 'SI'),
  transmissivity(
    'm2/d',
    'm²/d',
    1 / day,
    [...word.ratio(word.squareMetres, word.days), ...cubic(word.days)],
    'm² over 86 400 s',
  ),
  transmissivity('m2/h', 'm²/h', 1 / hour, word.ratio(word.squareMetres, word.hours), 'm² over 3600 s'),
  transmissivity('m2/min', 'm²/min', 1 / minute, word.ratio(word.squareMetres, word.minutes), 'm² over 60 s'),
  transmissivity('cm2/s', 'cm²/s', 1e-4, word.ratio(word.squareCentimetres, word.seconds), 'SI prefix'),
  transmissivity(
    'ft2/d',
    'ft²/d',
    foot ** 2 / day,
    [...word.ratio(word.squareFeet, word.days), ...overFoot(word.ratio(word.cubicFeet, word.days))],
    'NIST SP 811 B.8 "square foot (ft²)", over 86 400 s',
  ),
  transmissivity(
    'ft2/min',
    'ft²/min',
    foot ** 2 / minute,
    word.ratio(word.squareFeet, word.minutes),
    'NIST SP 811 B.8 "square foot (ft²)", over 60 s',
  ),
  transmissivity(
    'gpd-us/ft',
    'US gpd/ft',
    gallonUS / day / foot,
    overFoot(word.gallonsPerDay('us')),
    'NIST SP 811 B.8 "gallon (U.S.) per day (gal/d)", over "foot (ft)"',
  ),
  transmissivity(
    'gpd-imp/ft',
    'imp gpd/ft',
    gallonImperial / day / foot,
    overFoot(word.gallonsPerDay('imperial')),
    'NIST SP 811 B.8 "gallon [Canadian and U.K. (Imperial)] (gal)", over 86 400 s and "foot (ft)"',
  ),
]
