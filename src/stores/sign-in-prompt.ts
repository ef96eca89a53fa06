import { defineStore } from 'pinia'
import { ref } from 'vue'

/** The dialog that asks to sign in again over the page, so that an edit survives an expired session. */
export const useSignInPrompt = defineStore('sign-in-prompt', () => {
  const open = ref(false)
  let waiting: ((signedIn: boolean) => void)[] = []

  /** Opens the dialog; all requests that meet the expired session wait for one answer. */
  function ask(): Promise<boolean> {
    open.value = true
    return new Promise((resolve) => waiting.push(resolve))
  }

  function answer(signedIn: boolean) {
    open.value = false
    const resolvers = waiting
    waiting = []
    for (const resolve of resolvers) resolve(signedIn)
  }

  return { open, ask, answer }
})
