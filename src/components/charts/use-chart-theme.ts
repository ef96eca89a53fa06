import { computed, type ComputedRef } from 'vue'
import { useTheme } from 'vuetify'
import type { ChartTheme } from '#shared/charts/chart-theme.ts'

/** The colours of the page's present theme, for charts. */
export function useChartTheme(): ComputedRef<ChartTheme> {
  const theme = useTheme()
  return computed(() => {
    const colour = (name: string) => String(theme.current.value.colors[name])
    return {
      sheet: colour('surface'),
      line: colour('line'),
      ink: colour('on-surface'),
      inkSoft: colour('ink-soft'),
      deepWater: colour('primary'),
      ochre: colour('secondary'),
    }
  })
}
