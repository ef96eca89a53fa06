import type { ErrorCatalogue } from './catalogue.ts'

export const jobErrors = {
  'job/cancelled': { status: 409, sentence: () => 'The work was cancelled.' },
  'job/failed': { status: 500, sentence: () => 'The work failed. It can be started again.' },
  'job/process-died': {
    status: 500,
    sentence: () => 'The process that did the work ended several times. Tell your administrator.',
  },
  'job/not-active': { status: 409, sentence: () => 'This work has ended already.' },
} satisfies ErrorCatalogue
