import type { WellLoss } from '#shared/contracts/analyses.ts'
import { analysisResult } from '#shared/contracts/analysis-result.ts'
import { lossOf } from '#shared/hydraulics/step/step-method.ts'
import { localStart } from '../pumping-tests/start-time.ts'
import type { StepAnalysisRow } from './well-losses.repository.ts'

/** What an accepted step-drawdown test says of its well. */
export function wellLossView(row: StepAnalysisRow): WellLoss {
  const { others = [], extras } = analysisResult.parse(row.result)
  const { low: low_m3_s, high: high_m3_s } = lossOf(extras).rates
  return {
    analysisId: row.id,
    pumpingTestId: row.pumpingTestId,
    method: row.method,
    startLocal: localStart(row.startAt, row.zone, row.startPrecision),
    startPrecision: row.startPrecision,
    losses: others,
    rates: { low_m3_s, high_m3_s },
    inputsChanged: row.inputsChanged,
  }
}
