import { useQueryCache } from '@pinia/colada'
import { defineStore } from 'pinia'
import { computed, ref, shallowRef } from 'vue'
import { can as mayDo, visitor, type Action, type Viewer } from '#shared/contracts/permissions.ts'
import type { Region } from '#shared/contracts/region.ts'
import type { Session, SignIn } from '#shared/contracts/session.ts'
import { errorText } from '#shared/words/errors/index.ts'
import { changePassword } from '../api/account.ts'
import { fetchSession, signIn, signOut } from '../api/session.ts'
import { useMessages } from './messages.ts'
import { usePreferences } from './preferences.ts'

const RETRY_MS = 3_000
const wait = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms))

/** Who reads, what they may do, and in which region they are. */
export const useSession = defineStore('session', () => {
  const queries = useQueryCache()
  const current = shallowRef<Session | null>(null)
  /** Why the first question could not be answered; it is asked again until it can. */
  const trouble = ref('')
  let loading: Promise<void> | null = null

  const viewer = computed<Viewer>(() => current.value?.viewer ?? visitor)
  const email = computed(() => current.value?.viewer.email ?? '')
  const region = computed<Region | null>(() => current.value?.region ?? null)
  const signedIn = computed(() => viewer.value.id !== null)

  function can(action: Action): boolean {
    return mayDo(viewer.value, action, { openToVisitors: region.value?.openToVisitors ?? false })
  }

  /** What was fetched for one person is never shown to the next, not even while it is fetched anew. */
  function forget() {
    for (const entry of queries.getEntries()) {
      queries.setEntryState(entry, { status: 'pending', data: undefined, error: null })
      queries.invalidate(entry)
    }
  }

  /** Another person gets fresh pages, which ask for themselves; one with another role keeps the page and its entries. */
  function follow(before: Session['viewer'], now: Session['viewer']) {
    if (before.id !== now.id) forget()
    else if (before.role !== now.role || before.mayReview !== now.mayReview)
      queries.invalidateQueries().catch(() => undefined)
  }

  /** Takes over what the server says about who reads. */
  function enter(session: Session) {
    if (current.value) follow(current.value.viewer, session.viewer)
    current.value = session
    usePreferences().enter(session.preferences, session.region.unitSystem, session.viewer.id !== null)
  }

  async function loadUntilAnswered() {
    for (;;) {
      try {
        enter(await fetchSession())
        trouble.value = ''
        return
      } catch (error) {
        trouble.value = (error as Error).message
        await wait(RETRY_MS)
      }
    }
  }

  /** Resolves as soon as it is known who reads. */
  const known = (): Promise<void> => (loading ??= loadUntilAnswered())

  /** Somebody else has signed in in another window: the page becomes theirs, as after signing in here. */
  async function changeOver() {
    enter(await fetchSession())
    useMessages().tell(errorText('client/another-person'), 'caution')
  }

  const signInWith = async (credentials: SignIn) => enter(await signIn(credentials))

  const leave = async () => enter(await signOut())

  const changeOwnPassword = async (currentPassword: string, newPassword: string) =>
    enter(await changePassword({ currentPassword, newPassword }))

  function setRegion(changed: Region) {
    if (current.value) enter({ ...current.value, region: changed })
  }

  return {
    current,
    viewer,
    email,
    region,
    signedIn,
    trouble,
    can,
    known,
    enter,
    changeOver,
    signInWith,
    leave,
    changeOwnPassword,
    setRegion,
  }
})
