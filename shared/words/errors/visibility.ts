import type { ErrorCatalogue } from './catalogue.ts'

export const visibilityErrors = {
  'visibility/tests-more-visible': {
    status: 409,
    sentence: ({ count }) => `${count} tests of this well are more visible than that. Hide them first.`,
  },
  'visibility/has-values': {
    status: 409,
    sentence: () => 'A value of this record is in the regional table. Withdraw it before making the record private.',
  },
} satisfies ErrorCatalogue
