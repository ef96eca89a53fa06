import type { PumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import type { FormKind } from './test-form.ts'

type Words<Value extends string, Word = string> = Record<Value, Word>

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

/** What stands beside the well and the start of each kind of test. */
export const startWords: Words<FormKind, { title: string; well: string; time: string }> = {
  'constant-rate': { title: 'Pumped well and start', well: 'Pumped well', time: 'Pump on at' },
  step: { title: 'Pumped well and start', well: 'Pumped well', time: 'Pump on at' },
  slug: { title: 'Well and start', well: 'Well', time: 'First slug at' },
  'specific-capacity': { title: 'Pumped well and start', well: 'Pumped well', time: 'Pump on at' },
}

/** What each kind of test is for, as one chooses between them. */
export const kindHints: Words<FormKind> = {
  'constant-rate': 'One rate, or a few, and levels in the pumped well or around it.',
  step: 'Rising rates in one well: what the well itself loses.',
  slug: 'The level of one well moved at once, and its way back.',
  'specific-capacity': 'One rate and one drawdown at one time, where nothing more is known.',
}

/** Words as items of a select. */
export const itemsOf = (words: Record<string, string>) =>
  Object.entries(words).map(([value, title]) => ({ value, title }))

export type FieldErrors = (path: string) => readonly string[]
