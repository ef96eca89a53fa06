import { discharges, type DischargeUnit } from './discharges.ts'
import { foot } from './factors.ts'
import { feet, metre, ratio } from './spellings.ts'
import type { Unit } from './unit.ts'

const drawdown = { m: { toSI: 1, words: metre }, ft: { toSI: foot, words: feet } }

/** Every discharge has its partner per metre or per foot of drawdown. */
const specificCapacity = (q: DischargeUnit): Unit => ({
  id: `${q.id}/${q.per}`,
  dimension: 'specificCapacity',
  label: `${q.label}/${q.per}`,
  toSI: q.toSI / drawdown[q.per].toSI,
  aliases: ratio([q.id, q.label, ...q.aliases], drawdown[q.per].words),
  source: `${q.source}; over ${q.per}`,
})

export const specificCapacities: Unit[] = discharges.map(specificCapacity)
