import { day, hour, minute } from './factors.ts'
import { days, hours, minutes, seconds } from './spellings.ts'
import type { Unit } from './unit.ts'

const time = (id: string, toSI: number, aliases: string[], source: string): Unit => ({
  id,
  dimension: 'time',
  label: id,
  toSI,
  aliases,
  source,
})

export const times: Unit[] = [
  time('s', 1, seconds, 'SI base unit'),
  time('min', minute, minutes, 'NIST SP 811 B.8 "minute (min)", exact'),
  time('h', hour, hours, 'NIST SP 811 B.8 "hour (h)", exact'),
  time('d', day, days, 'NIST SP 811 B.8 "day (d)", exact'),
]
