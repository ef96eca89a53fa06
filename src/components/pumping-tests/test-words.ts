import type { PumpingTestInput } from '#shared/contracts/pumping-tests.ts'

type Words<Value extends string> = Record<Value, string>

export const precisionWords = { instant: 'Date and time', day: 'Day only', year: 'Year only' } as const
export const aquiferWords: Words<PumpingTestInput['aquifer']> = {
  confined: 'Confined',
  leaky: 'Leaky',
  unconfined: 'Unconfined',
}
export const intervalWords: Words<PumpingTestInput['intervalBasis']> = {
  screens: 'The open screens at that date',
  packers: 'Between packers',
  'open-hole': 'Open hole',
  unknown: 'Unknown',
}
export const thicknessWords: Words<PumpingTestInput['thicknessBasis']> = {
  aquifer: 'The whole aquifer',
  screen: 'The screen',
  saturated: 'Saturated at the date of the test',
  unknown: 'Unknown',
}
export const shareWords: Words<PumpingTestInput['units'][number]['basis']> = {
  'single-unit': 'Single unit',
  'flow-log': 'Flow log',
  judgement: 'Judgement',
}
export const distanceWords: Words<PumpingTestInput['observationWells'][number]['distanceBasis']> = {
  measured: 'Measured',
  map: 'From the map',
  override: 'Another distance',
}
export const visibilityWords: Words<PumpingTestInput['visibility']> = {
  published: 'Published',
  internal: 'Internal',
  private: 'Private, for you and stewards',
}

/** Words as items of a select. */
export const itemsOf = (words: Record<string, string>) =>
  Object.entries(words).map(([value, title]) => ({ value, title }))

export type FieldErrors = (path: string) => readonly string[]
