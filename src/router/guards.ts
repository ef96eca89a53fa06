import type { RouteMeta, RouteRecordNameGeneric } from 'vue-router'
import { useSession } from '../stores/session.ts'
import { toHome, toSignIn, type Link } from './links.ts'
import './meta.ts'
import { entriesFor, navigation, settingsPages, type NavigationEntry } from './navigation.ts'

type Session = ReturnType<typeof useSession>

const firstOf = (entries: readonly NavigationEntry[], session: Session): Link | null =>
  entriesFor(entries, session.can)[0]?.to ?? null

/** Pages that only lead on to another one. */
const passages: Record<string, (session: Session) => Link | null> = {
  home: (session) => firstOf(navigation, session),
  settings: (session) => firstOf(settingsPages, session),
}

interface Target {
  name?: RouteRecordNameGeneric | null
  meta: RouteMeta
  fullPath: string
}

/** Sends a visitor to sign in and passes on from pages that only lead further; what a role may not see, App says. */
export async function guard(to: Target): Promise<true | Link> {
  const session = useSession()
  await session.known()
  const name = String(to.name)
  if (name === 'sign-in' && session.signedIn) return toHome()
  const open = to.meta.frame === 'plain' || to.name === 'not-found'
  const allowed = to.meta.action ? session.can(to.meta.action) : firstOf(navigation, session) !== null
  if (!open && !session.signedIn && !allowed) return toSignIn(to.fullPath)
  return passages[name]?.(session) ?? true
}
