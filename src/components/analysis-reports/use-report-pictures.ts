import type { EChartsOption } from 'echarts'
import { computed } from 'vue'
import type { Analysis, KindWorkbenchInputs, WorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { KindFit } from '#shared/charts/kind-plot.ts'
import { kindReportChart, reportChart, reportSketch, type PicturedAnalysis } from '#shared/charts/report-pictures.ts'
import { distanceText } from '#shared/words/distances.ts'
import { sketchText } from '#shared/words/test-sketch.ts'
import { useUnits } from '../../composables/useUnits.ts'
import { usePreferences } from '../../stores/preferences.ts'

export interface ReportPictures {
  /** Address of the sketch, and what it shows; null where there is none. */
  sketch: { address: string; label: string } | null
  chart: (analysisId: number | null) => EChartsOption | null
}

/** Pictures of a report, by the builders that draw those of its PDF. */
export function useReportPictures(
  snapshot: () => WorkbenchInputs | KindWorkbenchInputs,
  analyses: () => readonly Analysis[],
) {
  const units = useUnits()
  const preferences = usePreferences()

  return computed<ReportPictures>(() => {
    const given = snapshot()
    if ('kind' in given) {
      const request = { ...given, units: units.system.value, direction: preferences.drawdownDirection }
      const fits = analyses() as unknown as ({ id: number } & KindFit)[]
      return { sketch: null, chart: (analysisId) => kindReportChart(request, fits, analysisId) }
    }
    const { inputs, surroundings } = given
    const distance = (metres: number) => distanceText(metres, units.system.value)
    const edges = surroundings.map((edge) => ({ ...edge, chosen: false }))
    const svg = reportSketch(inputs, edges, distance)
    const request = { inputs, units: units.system.value, direction: preferences.drawdownDirection }
    return {
      sketch: {
        address: `data:image/svg+xml;charset=utf-8,${encodeURIComponent(svg)}`,
        label: sketchText(inputs, edges, distance),
      },
      chart: (analysisId) => reportChart(request, analyses() as unknown as PicturedAnalysis[], analysisId),
    }
  })
}
