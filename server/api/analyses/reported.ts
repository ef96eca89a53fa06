import { z } from 'zod'
import type { StoredResult } from '#shared/contracts/analysis-result.ts'
import type { Evidence, EvidenceFacts } from '#shared/hydraulics/evidence.ts'

/** What came down to us of a test without readings: the snapshot of an analysis of method `reported`. */
export const reportedInputs = z.object({
  version: z.literal(1),
  kind: z.literal('reported'),
  origin: z.enum(['pumping-test', 'slug-test', 'specific-capacity', 'legacy-reviewed', 'legacy-number']),
  observationWell: z.boolean(),
  aquifer: z.enum(['confined', 'leaky', 'unconfined']),
  source: z.string().max(300),
})
export type ReportedInputs = z.infer<typeof reportedInputs>

export interface ReportedValue extends Omit<ReportedInputs, 'version' | 'kind'> {
  /** SI: m²/s, 1, m/s. */
  T: number
  S: number | null
  K: number | null
  storageClass: StoredResult['storageClass']
}

const normal975 = 1.959963984540054

function estimate(value: number, logSd: number): StoredResult['T'] {
  const factor = 10 ** (normal975 * logSd)
  return { value, low: value / factor, high: value * factor, logSd, determined: true }
}

/** There is nothing to calculate: the interval is that of values with this evidence. */
export function reportedResult(
  { T, S, K, storageClass }: ReportedValue,
  { logErrorT, storage }: Evidence,
): StoredResult {
  return {
    version: 1,
    method: 'reported',
    methodVersion: 1,
    T: estimate(T, logErrorT),
    S: S === null ? null : estimate(S, storage?.logError ?? logErrorT),
    K: K === null ? null : estimate(K, logErrorT),
    storageClass: S === null ? null : storageClass,
    extras: {},
    residuals: [],
    fit: {
      n: 0,
      effectiveN: 0,
      rmse_m: 0,
      autocorrelation: 0,
      iterations: 0,
      converged: true,
      singular: false,
      objective: 0,
    },
    findings: [],
    leftOut: [],
  }
}

/** What is known of a value without readings. */
export const reportedFacts = (
  { origin, observationWell, aquifer }: Pick<ReportedInputs, 'origin' | 'observationWell' | 'aquifer'>,
  storageClass: StoredResult['storageClass'],
): EvidenceFacts => ({
  origin,
  aquifer,
  observationWell,
  recoveryAgrees: false,
  radialFlowShown: false,
  conditionsHold: false,
  storageClass,
  distanceError: 0,
  ownLogSdT: null,
  ownLogSdS: null,
})
