import { useQuery } from '@pinia/colada'
import { computed, ref, watch } from 'vue'

export interface Page<Item> {
  items: Item[]
  total: number
  next: number | null
}

interface PagedOptions<Filter extends object, Item> {
  /** First part of the query key: the resource. */
  resource: string
  filter: () => Filter
  fetch: (query: Filter & { limit: number; offset: number }, signal: AbortSignal) => Promise<Page<Item>>
  limit?: number
}

/** A list that the server pages. The rows of the page before stay until the next ones are there. */
export function usePagedQuery<Filter extends object, Item>(options: PagedOptions<Filter, Item>) {
  const { resource, filter, fetch, limit = 50 } = options
  const page = ref(1)
  const asked = computed(() => ({ ...filter(), limit, offset: (page.value - 1) * limit }))
  watch(
    () => JSON.stringify(filter()),
    () => (page.value = 1),
  )
  const query = useQuery<Page<Item>>({
    key: () => [resource, 'list', JSON.stringify(asked.value)],
    query: ({ signal }) => fetch(asked.value, signal),
    placeholderData: (previous) => previous,
  })
  const pages = computed(() => Math.max(1, Math.ceil((query.data.value?.total ?? 0) / limit)))
  // Rows that went may have been the whole of the last page.
  watch(pages, (last) => {
    if (page.value > last && query.data.value) page.value = last
  })
  return { ...query, page, pages }
}
