import type { ErrorCatalogue } from './catalogue.ts'

export const readingErrors = {
  /** The sentence of the readings code that the whole file was refused with. */
  'readings/refused': { status: 400, sentence: ({ reason }) => String(reason) },
} satisfies ErrorCatalogue
