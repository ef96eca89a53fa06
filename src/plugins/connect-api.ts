import type { Pinia } from 'pinia'
import { setApiHooks } from '../api/hooks.ts'
import { useConnection } from '../stores/connection.ts'
import { useSession } from '../stores/session.ts'
import { useSignInPrompt } from '../stores/sign-in-prompt.ts'

/** Tells the client of the API what the application does when the session is over or the server silent. */
export function connectApi(pinia: Pinia) {
  const session = useSession(pinia)
  setApiHooks({
    // A visitor has no session that could have ended: the guard sends them to the sign-in page.
    signInAgain: () => (session.signedIn ? useSignInPrompt(pinia).ask() : Promise.resolve(false)),
    unavailable: () => useConnection(pinia).lost(),
    anotherPerson: () => void session.changeOver().catch(() => undefined),
  })
}
