import { onMounted, onScopeDispose, shallowRef, type Ref } from 'vue'
import type { Size } from '#shared/charts/plot-frame.ts'

/** Width and height of an element, as they change; null until it has any. */
export function useElementSize(element: Ref<HTMLElement | null>) {
  const size = shallowRef<Size | null>(null)
  const observer = new ResizeObserver(([entry]) => {
    const { width, height } = entry?.contentRect ?? { width: 0, height: 0 }
    const same = size.value?.width === width && size.value.height === height
    if (width > 0 && height > 0 && !same) size.value = { width, height }
  })
  onMounted(() => element.value && observer.observe(element.value))
  onScopeDispose(() => observer.disconnect())
  return size
}
