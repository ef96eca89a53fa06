import { onScopeDispose, readonly, ref } from 'vue'

/** Below this width the rail lies at the foot of the page and sheets come from below. */
export const NARROW_PX = 800

/** Whether the window is at least 800 px wide. */
export function useWide() {
  const query = window.matchMedia(`(min-width: ${NARROW_PX}px)`)
  const wide = ref(query.matches)
  const update = () => (wide.value = query.matches)
  query.addEventListener('change', update)
  onScopeDispose(() => query.removeEventListener('change', update))
  return readonly(wide)
}
