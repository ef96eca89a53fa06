/** What the application does when a request meets one of these; set once at start, so that api/ knows no store. */
export interface ApiHooks {
  /** The session is over. Resolves to true when the reader signed in again and the request may be repeated. */
  signInAgain: () => Promise<boolean>
  /** The server or its database does not answer. */
  unavailable: () => void
  /** Somebody else has signed in in another window of this browser; the page is no longer theirs who opened it. */
  anotherPerson: () => void
}

const hooks: ApiHooks = {
  signInAgain: () => Promise.resolve(false),
  unavailable: () => undefined,
  anotherPerson: () => undefined,
}

export const setApiHooks = (given: Partial<ApiHooks>) => Object.assign(hooks, given)

export const apiHooks = (): Readonly<ApiHooks> => hooks
