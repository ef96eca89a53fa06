import { foot, inch, surveyFoot } from './factors.ts'
import { centimetre, feet, inches, metre, millimetre } from './spellings.ts'
import type { Unit } from './unit.ts'

const length = (id: string, toSI: number, aliases: string[], source: string, label = id): Unit => ({
  id,
  dimension: 'length',
  label,
  toSI,
  aliases,
  source,
})

/** A bare "ft" is the international foot: the survey foot differs by 2 mm in a kilometre and is always written out. */
export const lengths: Unit[] = [
  length('m', 1, metre, 'SI base unit'),
  length('cm', 1e-2, centimetre, 'SI prefix'),
  length('mm', 1e-3, millimetre, 'SI prefix'),
  length('ft', foot, feet, 'NIST SP 811 B.8 "foot (ft)", exact'),
  length(
    'ft-us',
    surveyFoot,
    [
      'ftus',
      'us ft',
      'us survey ft',
      'us survey foot',
      'us survey feet',
      'survey ft',
      'survey foot',
      'survey feet',
      'sft',
    ],
    'NIST SP 811 B.8 "foot (U.S. survey) (ft)", 1200/3937 m exactly',
    'US survey ft',
  ),
  length('in', inch, inches, 'NIST SP 811 B.8 "inch (in)", exact'),
]
