import type { AdoptedValue } from '#shared/contracts/adopted-values.ts'
import { formatNumber } from '#shared/quantities/format.ts'
import { quantityDimension } from '#shared/words/values.ts'
import type { Units } from '../../composables/useUnits.ts'

export const valueText = (units: Units, value: AdoptedValue): string =>
  units.quantity(value.value, quantityDimension(value))

export const intervalText = (units: Units, { low, high, ...value }: AdoptedValue): string =>
  units.interval(low, high, quantityDimension(value))

/** The standard error of the logarithm, as the factor that it stands for: "× 1.6". */
export const factorText = ({ log10Error }: Pick<AdoptedValue, 'log10Error'>): string =>
  `×\u202f${formatNumber(10 ** log10Error, { figures: 2 })}`

export interface ValueMark {
  word: string
  meaning: string
  severity: 'caution' | 'note'
}

/** What a reader must know of a value beside its number. */
export function marksOf({ inputsChanged, composite, usable, validTo }: AdoptedValue): ValueMark[] {
  const marks: (ValueMark | false)[] = [
    validTo !== null && {
      word: 'Not current',
      meaning: 'This value was replaced or withdrawn; it is no part of the regional table now.',
      severity: 'caution',
    },
    inputsChanged && {
      word: 'Inputs changed',
      meaning: 'Readings, rates or distances of the test have changed since this value was adopted.',
      severity: 'caution',
    },
    composite && {
      word: 'Composite',
      meaning: 'The test spans several units; this is the share of this unit.',
      severity: 'note',
    },
    !usable && {
      word: 'Not used',
      meaning: 'It is kept and shown, but statistics in space and estimates do not use it.',
      severity: 'note',
    },
  ]
  return marks.filter((mark) => mark !== false)
}
