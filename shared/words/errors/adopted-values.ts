import type { ErrorCatalogue } from './catalogue.ts'

export const adoptedValueErrors = {
  'adopted-value/not-current': { status: 409, sentence: () => 'This value has been replaced or withdrawn already.' },
} satisfies ErrorCatalogue
