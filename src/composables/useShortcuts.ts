import { onScopeDispose, shallowReactive } from 'vue'
import { usePreferences } from '../stores/preferences.ts'

export interface Shortcut {
  key: string
  /** What it does, as the list of keys says it. */
  label: string
  run: () => void
}

const shortcuts = shallowReactive<Shortcut[]>([])

const typing = (target: EventTarget | null) =>
  target instanceof HTMLElement &&
  (target.isContentEditable || target.matches('input, textarea, select, [role="textbox"]'))

const dialogOpen = () =>
  document.querySelector('.v-overlay--active [role="dialog"], .v-overlay--active[role="dialog"]') !== null

function onKeydown(event: KeyboardEvent) {
  if (event.defaultPrevented || event.ctrlKey || event.metaKey || event.altKey) return
  if (typing(event.target) || dialogOpen() || !usePreferences().keys) return
  const found = [...shortcuts].reverse().find(({ key }) => key === event.key)
  if (!found) return
  event.preventDefault()
  found.run()
}

/** A single key as a command while the calling component lives. Silent in text fields and dialogs. */
export function useShortcut(shortcut: Shortcut) {
  shortcuts.push(shortcut)
  onScopeDispose(() => shortcuts.splice(shortcuts.indexOf(shortcut), 1))
}

/** The keys that work now. */
export const activeShortcuts = (): readonly Shortcut[] => shortcuts

/** Begins to listen; once, by the frame. */
export function listenForShortcuts() {
  window.addEventListener('keydown', onKeydown)
  onScopeDispose(() => window.removeEventListener('keydown', onKeydown))
}
