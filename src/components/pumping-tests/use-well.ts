import { useQuery } from '@pinia/colada'
import type { Ref } from 'vue'
import { fetchWell } from '../../api/wells.ts'

/** The well with this id; nothing while there is none. */
export function useWell(id: Readonly<Ref<number | null>>) {
  const { data } = useQuery({
    key: () => ['wells', id.value ?? 0],
    query: ({ signal }) => fetchWell(id.value ?? 0, signal),
    enabled: () => id.value !== null,
  })
  return data
}
