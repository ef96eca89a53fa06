import type { Finding } from '../analysis.ts'
import {
  antecedentOf,
  correctionOf,
  explainedFindings,
  lengthFindings,
  type Antecedent,
  type Correction,
  type Readings,
} from './correction.ts'
import { regression } from './regression.ts'

/** Degrees per hour. Source: Schureman 1958; the IHO list of constituents. */
export const tidalSpeeds = {
  M2: 28.9841042,
  S2: 30,
  N2: 28.4397295,
  K1: 15.0410686,
  O1: 13.9430356,
} as const
export type TideId = keyof typeof tidalSpeeds

/** More important ones first: where two cannot be told apart, the second is left out. */
const order: TideId[] = ['M2', 'K1', 'O1', 'S2', 'N2']

/** Angular speed in radians per second. */
export const tidalFrequency = (id: TideId) => (tidalSpeeds[id] * Math.PI) / 180 / 3600

/**
 * Takes off tides: level, trend and the five constituents M2, S2, N2, K1 and O1 by least squares on the readings before
 * pumping, the constituents then carried through the test. Two whose beat takes longer than the record are not told
 * apart, and only the larger of them is fitted (Rayleigh's criterion).
 * @throws AnalysisError with too few readings before pumping
 * Source: harmonic analysis, Schureman 1958, from memory.
 */
export function removeTides(readings: Readings): Correction {
  const whole = antecedentOf(readings, 2)
  const { fitted, findings } = separable(whole)
  const before = antecedentOf(readings, 2 * fitted.length + 4)
  const fit = regression(
    before.elapsed_s.map((time) => [1, time, ...waves(fitted, time)]),
    before.drawdown_m,
  )
  const trend = regression(
    before.elapsed_s.map((time) => [1, time]),
    before.drawdown_m,
  )
  const amplitudes = fit.coefficients.slice(2)
  const explained = trend.squares > 0 ? Math.max(0, 1 - fit.squares / trend.squares) : 0
  return correctionOf(
    'tides',
    readings,
    readings.elapsed_s.map((time) =>
      waves(fitted, time).reduce((sum, wave, k) => sum + wave * (amplitudes[k] as number), 0),
    ),
    { ...recordOf(fitted, amplitudes), explained },
    [...findings, ...lengthFindings(before), ...explainedFindings(explained)],
  )
}

const waves = (fitted: TideId[], time: number) =>
  fitted.flatMap((id) => [Math.cos(tidalFrequency(id) * time), Math.sin(tidalFrequency(id) * time)])

/** Amplitude in metres and phase in radians at the start of pumping, as amplitude·cos(ωt − phase). */
function recordOf(fitted: TideId[], amplitudes: number[]): Record<string, number> {
  return Object.fromEntries(
    fitted.flatMap((id, k) => {
      const [cosine = 0, sine = 0] = amplitudes.slice(2 * k, 2 * k + 2)
      return [
        [`${id}_amplitude_m`, Math.hypot(cosine, sine)],
        [`${id}_phase`, Math.atan2(sine, cosine)],
      ]
    }),
  )
}

function separable({ antecedent_s }: Antecedent): { fitted: TideId[]; findings: Finding[] } {
  const fitted: TideId[] = []
  const findings: Finding[] = []
  for (const id of order) {
    const near = fitted.find((other) => beat_s(id, other) > antecedent_s)
    if (near) {
      const params = { one: near, other: id, needed_s: beat_s(id, near) }
      findings.push({ code: 'tides-inseparable', severity: 'note', params })
    } else fitted.push(id)
  }
  return { fitted, findings }
}

/** Time in which two constituents come round to the same phase again. */
const beat_s = (a: TideId, b: TideId) => (2 * Math.PI) / Math.abs(tidalFrequency(a) - tidalFrequency(b))
