import { computed, ref } from 'vue'
import { methods } from '#shared/hydraulics/catalogue.ts'
import { useWorkbench } from './use-workbench.ts'

/**
 * The moment at which a distance plot compares wells, elapsed seconds (null: the last common one). It is the analysis'
 * own where its method compares wells at one moment, else only the plot's.
 */
export function useMoment() {
  const { present, editable, setOptions } = useWorkbench()
  const ofPlot = ref<number | null>(null)
  const ofAnalysis = computed(() =>
    present.value ? methods[present.value.method].options.some(({ name }) => name === 'time_s') : false,
  )
  const moment = computed(() => (ofAnalysis.value ? (present.value?.options.time_s ?? null) : ofPlot.value))
  const movable = computed(() => !ofAnalysis.value || editable.value)

  function setMoment(elapsed_s: number | null) {
    if (ofAnalysis.value) setOptions({ time_s: elapsed_s })
    else ofPlot.value = elapsed_s
  }

  return { moment, movable, setMoment }
}
