import type { ErrorCatalogue } from './catalogue.ts'

export const analysisErrors = {
  'analysis/refused': { status: 400, sentence: ({ reason }) => String(reason) },
  'analysis/not-finite': {
    status: 400,
    sentence: () => 'The readings are so large or so small that no value comes out. Check their unit.',
  },
  'analysis/too-long': {
    status: 422,
    sentence: ({ seconds }) =>
      `The calculation did not end within ${seconds} s and was stopped. Choose a shorter window or fewer wells, or try again when the server has less to do.`,
  },
  'analysis/too-much-memory': {
    status: 422,
    sentence: () =>
      'The calculation needs more memory than the server may use for one. Choose a shorter window or fewer wells.',
  },
  'analysis/result-differs': {
    status: 409,
    sentence: ({ quantity }) =>
      `The server calculated another ${quantity} than this page. Nothing was saved. Reload the page and try again.`,
  },
  'analysis/method-version': {
    status: 409,
    sentence: () => 'The method has been improved since this page was opened. Reload the page and try again.',
  },
  'analysis/inputs-changed': {
    status: 409,
    sentence: () =>
      'Readings, rates or distances have changed since this was calculated. Reload the page to calculate with the new ones.',
  },
  'analysis/not-draft': {
    status: 409,
    sentence: () =>
      'This analysis has been submitted and cannot be changed. Take it back while nobody has decided, or copy it.',
  },
  'analysis/not-yours': {
    status: 403,
    sentence: () => 'Only the person who made this analysis, or a steward, can change it.',
  },
  'analysis/reported-stays': {
    status: 409,
    sentence: () =>
      'A reported value has no draft to go back to. Delete it while nobody has decided about it, or a reviewer returns it.',
  },
  'analysis/reported-decided': {
    status: 409,
    sentence: () =>
      'A reviewer has decided about this reported value, so that it stays on record. A steward can withdraw an accepted one from the regional table.',
  },
  'analysis/no-transmissivity': {
    status: 400,
    sentence: () => 'This analysis gives no transmissivity that could be adopted.',
  },
  'analysis/wrong-kind': {
    status: 400,
    sentence: () => 'This method is for another kind of test.',
  },
  'analysis/nothing-found': {
    status: 400,
    sentence: () => 'This analysis gives no value that could be adopted.',
  },
  'analysis/outside-limits': { status: 400, sentence: ({ reason }) => `This value cannot be adopted: ${reason}` },
  'analysis/confirmation-needed': {
    status: 409,
    sentence: ({ reason }) => `Please confirm an unusual value: ${reason}`,
  },
  'analysis/private-test': {
    status: 400,
    sentence: () => 'A private test must be released before a value can be submitted from it.',
  },
  'review/comment-needed': { status: 400, sentence: () => 'Say what should be changed.' },
  'review/own-work': {
    status: 403,
    sentence: () =>
      'You took part in this analysis: you made, changed or submitted it, or chose among its readings. Ask another reviewer.',
  },
  'review/not-submitted': { status: 409, sentence: () => 'This analysis is not waiting for review any more.' },
} satisfies ErrorCatalogue
