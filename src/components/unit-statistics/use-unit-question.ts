import { computed } from 'vue'
import { unitStatisticsQuery, type UnitStatisticsQuery } from '#shared/contracts/unit-statistics.ts'
import { useAddressQuestion } from '../../composables/useAddressQuestion.ts'

const names = { quantity: 'quantity', evidence: 'evidence' } as const

/** Which values of the unit are asked for; it stands in the address. */
export function useUnitQuestion() {
  const { asked, ask } = useAddressQuestion<Partial<UnitStatisticsQuery>>({ names, fields: unitStatisticsQuery.shape })
  return {
    query: computed<UnitStatisticsQuery>(() => ({ ...asked.value, quantity: asked.value.quantity ?? 'T' })),
    ask: (query: Partial<UnitStatisticsQuery>) => ask(query),
  }
}
