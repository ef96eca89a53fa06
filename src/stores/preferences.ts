import { defineStore } from 'pinia'
import { computed, ref, watch } from 'vue'
import { defaultPreferences, readPreferences, type Preferences } from '#shared/contracts/account.ts'
import { unitSystemById } from '#shared/quantities/systems.ts'
import { savePreferences } from '../api/account.ts'
import { keep, kept } from './kept.ts'

export type Theme = Preferences['theme']

/** What the reader chose. Kept in the browser for the first paint, and on the account when signed in. */
export const usePreferences = defineStore('preferences', () => {
  const chosen = ref<Preferences>(readPreferences(kept('preferences')))
  const regionUnits = ref('')
  const saved = ref(false)
  /** Single keys as commands disturb some speech and screen-reader users: they can be switched off on this device. */
  const keys = ref(kept('keys') !== false)

  const theme = computed(() => chosen.value.theme)
  const drawdownDirection = computed(() => chosen.value.drawdownDirection)
  const unitSystem = computed(() => unitSystemById(chosen.value.unitSystem ?? regionUnits.value))

  watch(chosen, (value) => keep('preferences', value))
  watch(keys, (value) => keep('keys', value))

  /** Takes over what the account keeps; a visitor's choice stays in the browser. */
  function enter(ofAccount: Preferences, unitsOfRegion: string, signedIn: boolean) {
    regionUnits.value = unitsOfRegion
    saved.value = signedIn
    if (signedIn) chosen.value = ofAccount
  }

  /** Takes effect at once; @throws ApiProblem when the account could not keep it. */
  async function choose(change: Partial<Omit<Preferences, 'version'>>) {
    chosen.value = { ...defaultPreferences, ...chosen.value, ...change }
    if (saved.value) await savePreferences(chosen.value)
  }

  return { chosen, theme, drawdownDirection, unitSystem, keys, enter, choose }
})
