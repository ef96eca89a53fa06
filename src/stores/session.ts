import { defineStore } from 'pinia'
import { computed, ref, shallowRef } from 'vue'
import { can as mayDo, visitor, type Action, type Viewer } from '#shared/contracts/permissions.ts'
import type { Region } from '#shared/contracts/region.ts'
import type { Session, SignIn } from '#shared/contracts/session.ts'
import { changePassword } from '../api/account.ts'
import { fetchSession, signIn, signOut } from '../api/session.ts'
import { usePreferences } from './preferences.ts'

const RETRY_MS = 3_000
const wait = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms))

/** Who reads, what they may do, and in which region they are. */
export const useSession = defineStore('session', () => {
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

  /** Takes over what the server says about who reads. */
  function enter(session: Session) {
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
    signInWith,
    leave,
    changeOwnPassword,
    setRegion,
  }
})
