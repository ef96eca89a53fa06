import type { ErrorCatalogue } from './catalogue.ts'

export const requestErrors = {
  'request/invalid': {
    status: 400,
    sentence: () => 'Some fields cannot be used as they are. Correct the marked ones and send again.',
  },
  'request/malformed': {
    status: 400,
    sentence: () => 'The request could not be read as JSON. Reload the page and try again.',
  },
  'request/too-large': {
    status: 413,
    sentence: ({ limit }) => `What was sent is larger than ${limit}. Send less at a time.`,
  },
  'request/too-many': {
    status: 429,
    sentence: ({ seconds }) => `Too many requests in a short time. Try again in ${seconds} s.`,
  },
  'request/not-found': { status: 404, sentence: () => 'There is nothing at this address, or you may not see it.' },
  'request/csrf': { status: 403, sentence: () => 'The page was out of date. It has been refreshed: try once more.' },
  'request/origin': { status: 403, sentence: () => 'The request came from another site and was refused.' },
  'request/forbidden': {
    status: 403,
    sentence: () => 'Your role does not allow this. Ask an administrator if it should.',
  },
  'request/repeated': {
    status: 409,
    sentence: () => 'The same key was used for a different request. Reload the page and try again.',
  },
  'edit/conflict': {
    status: 409,
    sentence: () => 'Somebody changed this while you were editing. Compare both versions and decide.',
  },
  'server/failed': {
    status: 500,
    sentence: ({ requestId }) =>
      `Something went wrong on the server. Nothing was changed. Tell your administrator the number ${requestId}.`,
  },
  'server/unavailable': {
    status: 503,
    sentence: () =>
      'The database does not answer at the moment. Your entries are kept on this page: try again shortly.',
  },
  'server/full': {
    status: 507,
    sentence: () =>
      'The server has no room left on its disk. Nothing was saved; your entries are kept on this page. Tell your administrator to make room, then try again.',
  },
  'server/not-ready': { status: 503, sentence: ({ reason }) => `The server is not ready: ${reason}.` },
} satisfies ErrorCatalogue
