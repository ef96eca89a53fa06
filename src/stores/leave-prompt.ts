import { defineStore } from 'pinia'
import { ref } from 'vue'

/** The dialog that asks before a page with unsaved entries is left. */
export const useLeavePrompt = defineStore('leave-prompt', () => {
  const open = ref(false)
  let waiting: ((leave: boolean) => void) | null = null

  /** Resolves to whether the page may be left. A second question takes the place of the first, which ends as no. */
  function ask(): Promise<boolean> {
    waiting?.(false)
    open.value = true
    return new Promise((resolve) => (waiting = resolve))
  }

  function answer(leave: boolean) {
    open.value = false
    waiting?.(leave)
    waiting = null
  }

  return { open, ask, answer }
})
