import type { Finding } from '../analysis.ts'
import { lengthFindings, type Antecedent } from './antecedent.ts'
import type { Term } from './term.ts'

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
 * Tides: the five constituents M2, S2, N2, K1 and O1 by least squares on the readings before pumping, carried through
 * the test. Two whose beat takes longer than the record are not told apart, and only the larger of them is fitted
 * (Rayleigh's criterion).
 * Source: harmonic analysis, Schureman 1958, from memory.
 */
export function tidesTerm(before: Antecedent): Term {
  const { fitted, findings } = separable(before)
  return {
    kind: 'tides',
    given: null,
    needed: 2 * fitted.length + 4,
    lags_s: [0],
    columns: (times) =>
      fitted.flatMap((id) => {
        const frequency = tidalFrequency(id)
        return [times.map((time) => Math.cos(frequency * time)), times.map((time) => Math.sin(frequency * time))]
      }),
    record: ({ coefficients, covariance }) => recordOf(fitted, coefficients, covariance),
    findings: () => [...findings, ...lengthFindings(before)],
  }
}

/** Amplitude in metres, its standard deviation, and phase in radians at the start of pumping: amplitude·cos(ωt − phase). */
function recordOf(fitted: TideId[], coefficients: number[], covariance: number[][]): Record<string, number> {
  return Object.fromEntries(
    fitted.flatMap((id, k) => {
      const [cosine = 0, sine = 0] = coefficients.slice(2 * k, 2 * k + 2)
      const at = (i: number, j: number) => covariance[2 * k + i]?.[2 * k + j] as number
      const squares = cosine * cosine * at(0, 0) + 2 * cosine * sine * at(0, 1) + sine * sine * at(1, 1)
      const amplitude = Math.hypot(cosine, sine)
      return [
        [`${id}_amplitude_m`, amplitude],
        [`${id}_amplitudeSd_m`, Math.sqrt(Math.max(0, squares)) / (amplitude || 1)],
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
