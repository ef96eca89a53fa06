import { day, foot, gallonImperial, gallonUS } from './factors.ts'
import * as word from './spellings.ts'
import type { Unit } from './unit.ts'

const conductivity = (id: string, label: string, toSI: number, aliases: string[], source: string): Unit => ({
  id,
  dimension: 'conductivity',
  label,
  toSI,
  aliases,
  source,
})

const overSquareFoot = (spellings: string[]) => word.ratio(spellings, word.squareFeet)

export const conductivities: Unit[] = [
  conductivity('m/s', 'm/s', 1, word.ratio(word.metre, word.seconds), 'SI'),
  conductivity('m/d', 'm/d', 1 / day, word.ratio(word.metre, word.days), 'm over 86 400 s'),
  conductivity('cm/s', 'cm/s', 1e-2, word.ratio(word.centimetre, word.seconds), 'SI prefix'),
  conductivity(
    'ft/d',
    'ft/d',
    foot / day,
    word.ratio(word.feet, word.days),
    'NIST SP 811 B.8 "foot (ft)", over 86 400 s',
  ),
  conductivity(
    'gpd-us/ft2',
    'US gpd/ft²',
    gallonUS / day / foot ** 2,
    overSquareFoot(word.gallonsPerDay('us')),
    'NIST SP 811 B.8 "gallon (U.S.) per day (gal/d)", over "square foot (ft²)"',
  ),
  conductivity(
    'gpd-imp/ft2',
    'imp gpd/ft²',
    gallonImperial / day / foot ** 2,
    overSquareFoot(word.gallonsPerDay('imperial')),
    'NIST SP 811 B.8 "gallon [Canadian and U.K. (Imperial)] (gal)", over 86 400 s and "square foot (ft²)"',
  ),
]
