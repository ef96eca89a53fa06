import { computed, onScopeDispose, ref, watch, type Ref } from 'vue'
import { useWide } from './useWide.ts'

/** Below this width columns do not fit. */
const LEAST_PX = 640

/** Whether a part of the page has room for columns: in a wide window it has none when a sheet stands beside it. */
export function useRoomy(element: Readonly<Ref<HTMLElement | null>>) {
  const wide = useWide()
  const fits = ref(true)
  const observer = new ResizeObserver((entries) => {
    fits.value = (entries.at(-1)?.contentRect.width ?? LEAST_PX) >= LEAST_PX
  })
  watch(element, (now, before) => {
    if (before) observer.unobserve(before)
    if (now) observer.observe(now)
  })
  onScopeDispose(() => observer.disconnect())
  return computed(() => wide.value && fits.value)
}
