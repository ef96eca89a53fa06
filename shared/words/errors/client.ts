import type { ErrorCatalogue } from './catalogue.ts'

/** What the browser finds by itself, without an answer from the server. */
export const clientErrors = {
  'client/offline': {
    status: 503,
    sentence: () => 'The server does not answer at the moment. Your entries are kept on this page: try again shortly.',
  },
  'client/unreadable': {
    status: 500,
    sentence: () => 'The answer of the server could not be read. Reload the page: it may be older than the server.',
  },
  'client/another-person': {
    status: 403,
    sentence: () =>
      'Somebody else has signed in in another window of this browser. Nothing was saved under their name: sign in again to go on.',
  },
  'client/failed': {
    status: 500,
    sentence: () => 'Something went wrong on this page. Reload it and try again; nothing that was saved is lost.',
  },
} satisfies ErrorCatalogue
