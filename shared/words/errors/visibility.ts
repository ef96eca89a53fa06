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
  'visibility/publishing-is-for-stewards': {
    status: 400,
    sentence: () => 'A steward publishes records. Enter it as internal, and ask a steward to publish it.',
  },
  'visibility/embargo-over': {
    status: 400,
    sentence: () => 'This day has passed. Choose a later one, or leave it empty to publish at once.',
  },
} satisfies ErrorCatalogue
