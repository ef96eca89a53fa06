import { onMounted, onScopeDispose, type Ref } from 'vue'

const MODAL = '.v-overlay--active.v-dialog'

const focusIsLost = () => document.activeElement === document.body || document.activeElement?.closest('.v-overlay')

/**
 * While a dialog is open, the page behind it can neither be reached nor read out; when it closes, the focus returns
 * to where it was. Vuetify traps the focus, but leaves the page in the reading order and gives the focus back only
 * to an activator of its own.
 */
export function useModalInert(page: Ref<HTMLElement | null>) {
  const observer = new MutationObserver(update)
  let lastFocused: HTMLElement | null = null

  /** Vuetify makes the container of its overlays with the first one; only that is watched closely, never the map. */
  function watchOverlays() {
    const container = document.querySelector('.v-overlay-container')
    if (container) observer.observe(container, { childList: true, subtree: true, attributeFilter: ['class'] })
  }

  function update() {
    watchOverlays()
    const open = document.querySelector(MODAL) !== null
    if (!page.value || page.value.inert === open) return
    page.value.inert = open
    if (!open && focusIsLost()) lastFocused?.focus({ preventScroll: true })
  }

  function remember({ target }: FocusEvent) {
    if (target instanceof HTMLElement) lastFocused = target
  }

  onMounted(() => {
    page.value?.addEventListener('focusin', remember)
    observer.observe(document.body, { childList: true })
    update()
  })
  onScopeDispose(() => observer.disconnect())
}
