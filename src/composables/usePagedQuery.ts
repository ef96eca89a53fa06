import { useQuery } from '@pinia/colada'
import { computed, ref, watch, type Ref } from 'vue'

export interface Page<Item> {
  items: Item[]
  total: number
  next: number | null
}

/** Where the number of the page is kept; `instead` takes the place of a page that is none. */
interface Paging {
  page: Readonly<Ref<number>>
  turn: (to: number, instead?: boolean) => unknown
}

interface PagedOptions<Filter extends object, Item> {
  /** First part of the query key: the resource. */
  resource: string
  filter: () => Filter
  fetch: (query: Filter & { limit: number; offset: number }, signal: AbortSignal) => Promise<Page<Item>>
  limit?: number
  /** Left out, the list keeps its page itself, and a list of another filter begins at the first. */
  paging?: Paging
}

function ownPaging(filter: () => object): Paging {
  const page = ref(1)
  watch(
    () => JSON.stringify(filter()),
    () => (page.value = 1),
  )
  return { page, turn: (to) => (page.value = to) }
}

/** A list that the server pages. The rows of the page before stay until the next ones are there. */
export function usePagedQuery<Filter extends object, Item>(options: PagedOptions<Filter, Item>) {
  const { resource, filter, fetch, limit = 50, paging = ownPaging(filter) } = options
  const page = computed({ get: () => paging.page.value, set: (to) => void paging.turn(to) })
  const asked = computed(() => ({ ...filter(), limit, offset: (page.value - 1) * limit }))
  const query = useQuery<Page<Item>>({
    key: () => [resource, 'list', JSON.stringify(asked.value)],
    query: ({ signal }) => fetch(asked.value, signal),
    placeholderData: (previous) => previous,
  })
  const pages = computed(() => Math.max(1, Math.ceil((query.data.value?.total ?? 0) / limit)))
  // Rows that went may have been the whole of the last page. How many there are is not known before the answer.
  const last = computed(() => (query.data.value && !query.isPlaceholderData.value ? pages.value : Infinity))
  watch([page, last], ([shown, most]) => {
    if (shown > most) paging.turn(most, true)
  })
  return { ...query, page, pages }
}
