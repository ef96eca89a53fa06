import type { ErrorCatalogue } from './catalogue.ts'

export const readingErrors = {
  /** The sentence of the readings code that the whole file was refused with. */
  'readings/refused': { status: 400, sentence: ({ reason }) => String(reason) },
  'readings/too-much-memory': {
    status: 422,
    sentence: () =>
      'The file takes more memory than the server may use for one. Keep only the columns of time and value, or send fewer rows.',
  },
} satisfies ErrorCatalogue
