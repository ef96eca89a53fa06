import { outsideQuantities, type OutsideQuantity } from '#shared/hydraulics/corrections/kinds.ts'
import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatInterval } from '#shared/quantities/format.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'
import type { Params, ReadingCode } from '#shared/readings/codes.ts'
import { readingIssueText } from './readings.ts'

/** The reader's unit for values of a series. */
export const outsideUnit = (quantity: OutsideQuantity, units: UnitSystem): string =>
  units[outsideQuantities[quantity].dimension]

/** What is said of a row, with its values in the unit of the series. */
export const outsideIssueText = (quantity: OutsideQuantity, code: ReadingCode, params: Params, units: UnitSystem) =>
  readingIssueText(code, params, { ...units, length: outsideUnit(quantity, units) })

interface Extent {
  quantity: OutsideQuantity
  firstS: number
  lastS: number
  lowest: number
  highest: number
}

/** "Air pressure, −6 d to 2 d, 98.1 to 102 kPa". */
export function outsideText({ quantity, firstS, lastS, lowest, highest }: Extent, units: UnitSystem): string {
  const span = `${formatElapsed(firstS)} to ${formatElapsed(lastS)}`
  const values = formatInterval(lowest, highest, outsideUnit(quantity, units), { figures: 4, trim: true })
  return [outsideQuantities[quantity].label, span, values].join(', ')
}
