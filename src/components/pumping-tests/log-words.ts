import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { DateOrder, DecimalMark, Delimiter, ElapsedUnit, Quantity } from '#shared/readings/model.ts'
import { unitById } from '#shared/quantities/units.ts'

export const delimiterWords: Record<Delimiter, string> = {
  ',': 'Comma',
  ';': 'Semicolon',
  '\t': 'Tab',
  '|': 'Bar',
  ' ': 'Space',
}
export const decimalWords: Record<DecimalMark, string> = { '.': 'Point, 12.5', ',': 'Comma, 12,5' }
export const quantityWords: Record<Quantity, string> = {
  depth: 'Depth to water',
  level: 'Water-level elevation',
  drawdown: 'Drawdown',
}
/** In a slug test the level moves both ways. */
export const quantityWordsOf = (kind: PumpingTest['kind']): Record<Quantity, string> =>
  kind === 'slug' ? { ...quantityWords, drawdown: 'Displacement from the static level' } : quantityWords
export const timeKindWords = { elapsed: 'Elapsed time', clock: 'Clock time' } as const
export const elapsedWords: Record<ElapsedUnit, string> = {
  s: 'Seconds',
  min: 'Minutes',
  h: 'Hours',
  d: 'Days',
  'h:m:s': 'Hours:minutes:seconds',
  'm:s': 'Minutes:seconds',
}
export const dateOrderWords: Record<DateOrder, string> = {
  ymd: 'Year, month, day',
  dmy: 'Day, month, year',
  mdy: 'Month, day, year',
}
export const quantityText = (quantity: Quantity, unitId: string) =>
  `${quantityWords[quantity]}, ${unitById(unitId).label}`
