import { computed } from 'vue'
import { adoptedValueQuery, type AdoptedValueFilters, type AdoptedValueSort } from '#shared/contracts/adopted-values.ts'
import { useAddressQuestion } from '../../composables/useAddressQuestion.ts'

export type TableFilters = Omit<AdoptedValueFilters, 'bbox'>

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
  sort: 'sort',
} as const

const LIMIT = 50
const usual: AdoptedValueSort = 'well'

/** What the regional table is asked. */
export function useTableQuestion() {
  const { asked, page, ask, turn } = useAddressQuestion<TableFilters & { sort?: AdoptedValueSort }>({
    names,
    fields: adoptedValueQuery.shape,
  })

  const filters = computed<TableFilters>(() => {
    const { sort: _order, ...rest } = asked.value
    return rest
  })
  const sort = computed(() => asked.value.sort ?? usual)
  const query = computed(() => ({
    ...filters.value,
    sort: sort.value,
    limit: LIMIT,
    offset: (page.value - 1) * LIMIT,
  }))
  const order = (wanted: AdoptedValueSort) => (wanted === usual ? undefined : wanted)

  return {
    query,
    filters,
    sort,
    page,
    limit: LIMIT,
    setFilters: (wanted: TableFilters, typed = false) => ask({ ...wanted, sort: order(sort.value) }, typed),
    setSort: (wanted: AdoptedValueSort) => ask({ ...filters.value, sort: order(wanted) }),
    setPage: (wanted: number) => turn(wanted),
  }
}
