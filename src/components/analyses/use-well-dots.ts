import { computed, type Ref } from 'vue'
import type { PlotWell } from '#shared/charts/plot-wells.ts'
import { distanceText } from '#shared/words/distances.ts'
import { useUnits } from '../../composables/useUnits.ts'
import { useWorkbench } from './use-workbench.ts'

/** Wells of a plot as its legend names them: "OB-1, 30 m". */
export function useWellDots(plot: Readonly<Ref<{ wells: readonly PlotWell[] }>>) {
  const { snapshot } = useWorkbench()
  const units = useUnits()

  function place({ role, wellId }: PlotWell): string {
    if (role === 'pumped') return 'pumped well'
    const found = snapshot.value.inputs.series.find((series) => series.wellId === wellId)
    return distanceText(found?.distance_m ?? 0, units.system.value)
  }

  return computed(() => plot.value.wells.map((well, index) => ({ index, label: `${well.label}, ${place(well)}` })))
}
