import { computed, ref } from 'vue'
import { useWorkbench } from './use-workbench.ts'

/** The well whose derivative is diagnosed: the one asked for, else the first of the analysis. */
export function useDiagnosed() {
  const { snapshot, present } = useWorkbench()
  const asked = ref<string | null>(null)
  return computed<string | null>({
    get: () => {
      const shown = present.value?.options.wellIds ?? snapshot.value.inputs.series.map(({ wellId }) => wellId)
      return asked.value !== null && shown.includes(asked.value) ? asked.value : (shown[0] ?? null)
    },
    set: (wellId) => (asked.value = wellId),
  })
}
