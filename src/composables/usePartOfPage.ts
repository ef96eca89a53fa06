import { computed, type WritableComputedRef } from 'vue'
import { useRoute, useRouter } from 'vue-router'

/** Which part of a page is open, as the address says: Back and links lead to it. The first one has no word there. */
export function usePartOfPage<Part extends string>(parts: () => readonly Part[]): WritableComputedRef<Part> {
  const route = useRoute()
  const router = useRouter()
  return computed({
    get: () => {
      const all = parts()
      return all.find((part) => part === route.query.part) ?? (all[0] as Part)
    },
    set: (part) => {
      const { part: _before, ...query } = route.query
      void router.push({ query: part === parts()[0] ? query : { ...query, part } })
    },
  })
}
