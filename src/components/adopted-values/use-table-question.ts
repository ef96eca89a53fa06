import { computed } from 'vue'
import { useRoute, useRouter, type LocationQueryRaw } from 'vue-router'
import { adoptedValueQuery, type AdoptedValueFilters, type AdoptedValueSort } from '#shared/contracts/adopted-values.ts'

export type TableFilters = Omit<AdoptedValueFilters, 'bbox'>

/** Names in the address are short, because people read and share them. */
const names = {
  unit: 'unitId',
  quantity: 'quantity',
  class: 'storageClass',
  evidence: 'evidence',
  method: 'method',
  from: 'yearFrom',
  to: 'yearTo',
  text: 'text',
  well: 'wellId',
} as const satisfies Record<string, keyof TableFilters>

const LIMIT = 50
const { sort: sortField, ...fields } = adoptedValueQuery.shape

type Name = keyof typeof names

/** A part of the address is left out where it is no such thing: a link may come from anywhere. */
function readFilters(query: LocationQueryRaw): TableFilters {
  const read = (Object.keys(names) as Name[]).flatMap((name) => {
    const text = query[name]
    const parsed = typeof text === 'string' && text !== '' ? fields[names[name]].safeParse(text) : null
    return parsed?.success && parsed.data !== undefined ? [[names[name], parsed.data] as const] : []
  })
  return Object.fromEntries(read)
}

function write(filters: TableFilters): LocationQueryRaw {
  const written = (Object.keys(names) as Name[]).map((name) => [name, filters[names[name]]] as const)
  return Object.fromEntries(written.filter(([, value]) => value !== undefined && value !== ''))
}

/** What the table is asked. It stands in the address, so that Back and links bring the same rows. */
export function useTableQuestion() {
  const route = useRoute()
  const router = useRouter()

  const filters = computed(() => readFilters(route.query))
  const sort = computed<AdoptedValueSort>(() => sortField.catch('well').parse(route.query.sort))
  const page = computed(() => Math.max(1, Math.floor(Number(route.query.page)) || 1))
  const query = computed(() => ({
    ...filters.value,
    sort: sort.value,
    limit: LIMIT,
    offset: (page.value - 1) * LIMIT,
  }))

  const rest = (sortBy: AdoptedValueSort, number: number): LocationQueryRaw => ({
    ...(sortBy === 'well' ? {} : { sort: sortBy }),
    ...(number === 1 ? {} : { page: number }),
  })
  const go = (target: LocationQueryRaw, replace = false) =>
    router[replace ? 'replace' : 'push']({ name: String(route.name), params: route.params, query: target })

  return {
    query,
    filters,
    sort,
    page,
    limit: LIMIT,
    /** `typed`: the letters of a word are not steps that Back should undo one by one. */
    setFilters: (wanted: TableFilters, typed = false) => go({ ...write(wanted), ...rest(sort.value, 1) }, typed),
    setSort: (wanted: AdoptedValueSort) => go({ ...write(filters.value), ...rest(wanted, 1) }),
    setPage: (wanted: number) => go({ ...write(filters.value), ...rest(sort.value, wanted) }),
  }
}
