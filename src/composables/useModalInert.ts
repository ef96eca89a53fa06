import { onMounted, onScopeDispose, type Ref } from 'vue'

const MODAL = '.v-overlay--active.v-dialog'

/**
 * While a dialog is open, the page behind it can neither be reached nor read out.
 * Vuetify traps the focus but leaves the page in the reading order.
 */
export function useModalInert(page: Ref<HTMLElement | null>) {
  const observer = new MutationObserver(update)

  /** Vuetify makes the container of its overlays with the first one; only that is watched closely, never the map. */
  function watchOverlays() {
    const container = document.querySelector('.v-overlay-container')
    if (container) observer.observe(container, { childList: true, subtree: true, attributeFilter: ['class'] })
  }

  function update() {
    watchOverlays()
    page.value?.toggleAttribute('inert', document.querySelector(MODAL) !== null)
  }

  onMounted(() => {
    observer.observe(document.body, { childList: true })
    update()
  })
  onScopeDispose(() => observer.disconnect())
}
