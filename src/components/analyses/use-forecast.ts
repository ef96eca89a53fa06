import { computed, ref } from 'vue'
import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import type { RateStep } from '#shared/hydraulics/analysis.ts'
import { forecastDrawdown, forecastRefusal } from '#shared/hydraulics/forecast.ts'
import type { AnalysedCurve } from '#shared/hydraulics/forecast-uncertainty.ts'
import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { toSI } from '#shared/quantities/units.ts'
import { analysisErrorText, findingText } from '#shared/words/findings.ts'
import { drawdownText, forecastRefusalText } from '#shared/words/forecast.ts'
import { usePreferences } from '../../stores/preferences.ts'
import { bySeverity } from './outcome.ts'
import { useWorkbench } from './use-workbench.ts'

/** A rate as it is typed: null while there is no number. */
export interface TypedRate {
  start_s: number | null
  rate_m3_s: number | null
}

/** Shares of the time asked for at which drawdown is told, so that its growth can be seen. */
const SHARES = [0.01, 0.1, 1]
const isWhole = (step: TypedRate): step is RateStep => step.start_s !== null && step.rate_m3_s !== null

/** The question of the forecast panel, and its answer by the open analysis. */
export function useForecast() {
  const { snapshot, resting } = useWorkbench()
  const preferences = usePreferences()

  const last = [...snapshot.value.inputs.rates].reverse().find(({ rate_m3_s }) => rate_m3_s > 0)
  const question = ref({
    distance_m: 100 as number | null,
    time_s: toSI(30, 'd') as number | null,
    bearing_deg: 0 as number | null,
    rates: [{ start_s: 0, rate_m3_s: last?.rate_m3_s ?? null }] as TypedRate[],
  })

  const analysed = computed<AnalysedCurve | null>(() =>
    resting.value
      ? { inputs: snapshot.value.inputs, options: resting.value.work.options, result: resting.value.result }
      : null,
  )
  const hasBoundaries = computed(() => (analysed.value?.options.boundaries ?? []).length > 0)

  function ask(given: AnalysedCurve) {
    const { distance_m, time_s, bearing_deg, rates } = question.value
    if (!(distance_m && distance_m > 0) || !(time_s && time_s > 0)) return { refused: 'Give a distance and a time.' }
    if (!rates.every(isWhole)) return { refused: 'Give each step a beginning and a rate.' }
    const bearing = hasBoundaries.value ? { bearing_deg } : {}
    const times_s = SHARES.map((share) => share * time_s)
    const { points, findings } = forecastDrawdown(given, { distance_m, ...bearing, rates, times_s })
    return {
      rows: points.map((point) => ({
        after: formatElapsed(point.time_s),
        ...drawdownText(point, preferences.unitSystem),
      })),
      findings: bySeverity(findings).map((finding) => ({
        ...finding,
        text: findingText(finding, preferences.unitSystem),
      })),
    }
  }

  const answer = computed(() => {
    if (!analysed.value) return { refused: '', never: true }
    const refusal = forecastRefusal(analysed.value.result)
    if (refusal) return { refused: forecastRefusalText(refusal), never: true }
    try {
      return ask(analysed.value)
    } catch (error) {
      if (error instanceof AnalysisError)
        return { refused: analysisErrorText(error.code, error.params, preferences.unitSystem) }
      if (error instanceof RangeError) return { refused: 'The solution gives no drawdown for this question.' }
      throw error
    }
  })

  return { shown: computed(() => analysed.value !== null), question, hasBoundaries, answer }
}
