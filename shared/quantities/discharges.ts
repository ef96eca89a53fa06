import { acreFoot, day, foot, gallonImperial, gallonUS, hour, litre, minute } from './factors.ts'
import * as word from './spellings.ts'
import type { Unit } from './unit.ts'

/** A discharge also says which length it is divided by in the trade's specific capacities. */
export interface DischargeUnit extends Unit {
  per: 'm' | 'ft'
}

const discharge = (
  id: string,
  label: string,
  per: DischargeUnit['per'],
  toSI: number,
  aliases: string[],
  source: string,
): DischargeUnit => ({ id, dimension: 'discharge', label, per, toSI, aliases, source })

export const discharges: DischargeUnit[] = [
  discharge('m3/s', 'm³/s', 'm', 1, ['cumec', 'cumecs', 'cms', ...word.ratio(word.cubicMetres, word.seconds)], 'SI'),
  discharge(
    'L/s',
    'L/s',
    'm',
    litre,
    ['lps', ...word.ratio(word.litres, word.seconds)],
    'L = 10⁻³ m³ (SP 811 Table 6)',
  ),
  discharge(
    'L/min',
    'L/min',
    'm',
    litre / minute,
    ['lpm', ...word.ratio(word.litres, word.minutes)],
    'L = 10⁻³ m³ (SP 811 Table 6), over 60 s',
  ),
  discharge(
    'm3/h',
    'm³/h',
    'm',
    1 / hour,
    ['cmh', 'm3h', ...word.ratio(word.cubicMetres, word.hours)],
    'm³ over 3600 s',
  ),
  discharge(
    'm3/d',
    'm³/d',
    'm',
    1 / day,
    ['cmd', 'm3d', ...word.ratio(word.cubicMetres, word.days)],
    'm³ over 86 400 s',
  ),
  discharge(
    'ML/d',
    'ML/d',
    'm',
    (1e6 * litre) / day,
    ['mld', ...word.ratio(word.megalitres, word.days)],
    '10⁶ L over 86 400 s',
  ),
  discharge(
    'gpm-us',
    'US gpm',
    'ft',
    gallonUS / minute,
    word.gallonsPerMinute('us'),
    'NIST SP 811 B.8 "gallon (U.S.) per minute (gpm) (gal/min)"',
  ),
  discharge(
    'gpm-imp',
    'imp gpm',
    'ft',
    gallonImperial / minute,
    word.gallonsPerMinute('imperial'),
    'NIST SP 811 B.8 "gallon [Canadian and U.K. (Imperial)] (gal)", over 60 s',
  ),
  discharge(
    'ft3/min',
    'ft³/min',
    'ft',
    foot ** 3 / minute,
    ['cfm', ...word.ratio(word.cubicFeet, word.minutes)],
    'NIST SP 811 B.8 "cubic foot per minute (ft³/min)"',
  ),
  discharge(
    'ft3/s',
    'ft³/s',
    'ft',
    foot ** 3,
    ['cfs', 'cusec', 'cusecs', ...word.ratio(word.cubicFeet, word.seconds)],
    'NIST SP 811 B.8 "cubic foot per second (ft³/s)"',
  ),
  discharge(
    'MGD-us',
    'US MGD',
    'ft',
    (1e6 * gallonUS) / day,
    word.millionGallonsPerDay('us'),
    '10⁶ times NIST SP 811 B.8 "gallon (U.S.) per day (gal/d)"',
  ),
  discharge(
    'MGD-imp',
    'imp MGD',
    'ft',
    (1e6 * gallonImperial) / day,
    word.millionGallonsPerDay('imperial'),
    '10⁶ times NIST SP 811 B.8 "gallon [Canadian and U.K. (Imperial)] (gal)", over 86 400 s',
  ),
  discharge(
    'acre-ft/d',
    'acre-ft/d',
    'ft',
    acreFoot / day,
    ['afd', ...word.ratio(word.acreFeet, word.days)],
    'NIST SP 811 B.8 "acre foot" (survey foot), over 86 400 s',
  ),
]
