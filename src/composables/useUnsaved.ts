import { onScopeDispose } from 'vue'
import { useRouter } from 'vue-router'
import { useLeavePrompt } from '../stores/leave-prompt.ts'

/**
 * Asks once before the page of the calling form is left while it holds what was entered and not saved: by a link, Back,
 * Esc of a sheet, a click on the map, or closing the window.
 * @returns lets go, to be called once everything is saved
 */
export function useUnsaved(changed: () => boolean): () => void {
  const prompt = useLeavePrompt()
  let held = true
  const unsaved = () => held && changed()

  const stop = useRouter().beforeEach((to, from) => to.path === from.path || !unsaved() || prompt.ask())
  // The browser asks in words of its own.
  const warn = (event: BeforeUnloadEvent) => unsaved() && event.preventDefault()
  window.addEventListener('beforeunload', warn)
  onScopeDispose(() => {
    stop()
    window.removeEventListener('beforeunload', warn)
  })
  return () => (held = false)
}
