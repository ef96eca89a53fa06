import { computed } from 'vue'
import { useRoute } from 'vue-router'

/** The record id in the address. It stays what it was while the page is being left. */
export function useRouteId() {
  const route = useRoute()
  let last = 0
  return computed(() => {
    const id = Number(route.params.id)
    return Number.isInteger(id) && id > 0 ? (last = id) : last
  })
}
