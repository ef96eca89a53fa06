import type { Finding, FitSummary, LeftOut, ParameterEstimate, Residual, StorageClass } from '../analysis.ts'
import { determinationFindings } from '../findings.ts'
import type { KindOutcome } from '../kind.ts'
import { parameterEstimate, UNDETERMINED_FACTOR } from '../parameter-estimate.ts'
import { thickened } from './thickened.ts'
import type { Heads, SlugInputs } from './slug-test.ts'

/** ASTM D4044 in the field: three repeats. */
const EXPECTED_REPEATS = 3
/** Ratio of K between repeats up to which they agree, and of H0 from which they differ (common practice). */
export const REPEAT_RATIO = { agree: 1.25, heads: 1.5 }

/** What a method found in one repeat. */
export interface RepeatFit {
  heads: Heads
  /** Conductivity, with the standard deviation of its logarithm from the scatter of the readings. */
  K: number
  fitSd: number
  freedom: number
  /** Storativity, where the method gives one. */
  S?: { value: number; fitSd: number }
  residuals: Residual[]
  summary: FitSummary
  /** Numbers from which the curve is drawn; stored with the repeat's place in the list. */
  drawn: Record<string, number>
  findings: Finding[]
}

/** One outcome of all repeats: geometric means, with the larger of their own scatter and of that between them. */
export function combinedOutcome(
  inputs: SlugInputs,
  fits: RepeatFit[],
  { otherSd, findings, leftOut }: { otherSd: number; findings: Finding[]; leftOut: LeftOut[] },
): KindOutcome {
  const K = pooled(fits, Math.hypot(otherSd, 2 * inputs.radiusError))
  const S = pooledStorage(fits)
  return {
    T: thickened(K, inputs),
    S,
    storageClass: S ? (inputs.aquifer === 'unconfined' ? 'apparent' : ('elastic' satisfies StorageClass)) : null,
    K,
    extras: Object.assign({}, ...fits.map(extrasOf)) as Record<string, number>,
    residuals: fits.flatMap(({ residuals }) => residuals),
    fit: combinedSummary(fits.map(({ summary }) => summary)),
    findings: [
      ...repeatFindings(fits),
      ...distinct([...fits.flatMap((fit) => fit.findings), ...findings]),
      ...determinationFindings({ K }),
      ...(S ? [storageFinding] : []),
      ...(inputs.thickness_m === null ? [thicknessFinding] : []),
    ],
    leftOut,
  }
}

const storageFinding: Finding = { code: 'slug-storage', severity: 'note', params: {} }
const thicknessFinding: Finding = { code: 'slug-no-thickness', severity: 'note', params: {} }

function pooled(fits: RepeatFit[], otherSd: number): ParameterEstimate {
  const logs = fits.map(({ K }) => Math.log(K))
  const uncertainty = {
    ...scatterOf(
      logs,
      fits.map(({ fitSd }) => fitSd),
      fits,
    ),
    otherSd,
  }
  return parameterEstimate(Math.exp(mean(logs)), uncertainty, UNDETERMINED_FACTOR.T)
}

function pooledStorage(fits: RepeatFit[]): ParameterEstimate | null {
  const found = fits.flatMap(({ S }) => (S ? [S] : []))
  if (found.length < fits.length) return null
  const logs = found.map(({ value }) => Math.log(value))
  const uncertainty = {
    ...scatterOf(
      logs,
      found.map(({ fitSd }) => fitSd),
      fits,
    ),
    otherSd: 0,
  }
  return parameterEstimate(Math.exp(mean(logs)), uncertainty, UNDETERMINED_FACTOR.S)
}

function scatterOf(logs: number[], sds: number[], fits: RepeatFit[]): { fitSd: number; freedom: number } {
  const count = logs.length
  const own = { fitSd: Math.hypot(...sds) / count, freedom: fits.reduce((sum, { freedom }) => sum + freedom, 0) }
  if (count < 2) return own
  const centre = mean(logs)
  const spread = Math.sqrt(logs.reduce((sum, value) => sum + (value - centre) ** 2, 0) / (count - 1) / count)
  return spread > own.fitSd ? { fitSd: spread, freedom: count - 1 } : own
}

/** Whether the repeats agree, and whether what sets them apart is the size of the slug. */
function repeatFindings(fits: RepeatFit[]): Finding[] {
  const few: Finding[] =
    fits.length < EXPECTED_REPEATS
      ? [{ code: 'repeats-few', severity: 'note', params: { repeats: fits.length, expected: EXPECTED_REPEATS } }]
      : []
  if (fits.length < 2) return few
  const bySize = [...fits].sort((a, b) => size(a) - size(b))
  const [smallest, largest] = [bySize[0] as RepeatFit, bySize.at(-1) as RepeatFit]
  const values = fits.map(({ K }) => K)
  const ratio = Math.max(...values) / Math.min(...values)
  const params = { ratio, limit: REPEAT_RATIO.agree, small_m: size(smallest), large_m: size(largest) }
  if (ratio <= REPEAT_RATIO.agree) {
    return [...few, size(largest) >= REPEAT_RATIO.heads * size(smallest) ? agree(params) : alike(params)]
  }
  const bySlug = size(largest) >= REPEAT_RATIO.heads * size(smallest) && monotonic(bySize.map(({ K }) => K))
  return [...few, { code: bySlug ? 'depends-on-head' : 'repeats-disagree', severity: 'caution', params }]
}

const agree = (params: Finding['params']): Finding => ({ code: 'repeats-agree', severity: 'good', params })
const alike = (params: Finding['params']): Finding => ({ code: 'repeats-alike', severity: 'note', params })

const size = ({ heads }: RepeatFit) => Math.abs(heads.repeat.initial_m)

function monotonic(values: number[]): boolean {
  const steps = values.slice(1).map((value, i) => value - (values[i] as number))
  return steps.every((step) => step > 0) || steps.every((step) => step < 0)
}

function extrasOf({ heads, K, drawn }: RepeatFit, index: number): Record<string, number> {
  const named = { K_m_s: K, initial_m: heads.repeat.initial_m, ...drawn }
  return Object.fromEntries(Object.entries(named).map(([name, value]) => [repeatExtra(name, index), value]))
}

/** Name of a number of one repeat among the extras. */
export const repeatExtra = (name: string, index: number) => `${name}_${index + 1}`

function combinedSummary(summaries: FitSummary[]): FitSummary {
  const sum = (pick: (one: FitSummary) => number) => summaries.reduce((total, one) => total + pick(one), 0)
  const n = sum((one) => one.n)
  return {
    n,
    effectiveN: sum((one) => one.effectiveN),
    rmse_m: Math.sqrt(sum((one) => one.n * one.rmse_m ** 2) / n),
    autocorrelation: sum((one) => one.n * one.autocorrelation) / n,
    iterations: Math.max(...summaries.map((one) => one.iterations)),
    converged: summaries.every((one) => one.converged),
    singular: summaries.some((one) => one.singular),
    objective: sum((one) => one.objective),
  }
}

/** The same statement about several repeats is made once. */
function distinct(findings: Finding[]): Finding[] {
  const seen = new Set<string>()
  return findings.filter(({ code, params }) => {
    const key = `${code} ${JSON.stringify(params)}`
    return seen.has(key) ? false : (seen.add(key), true)
  })
}

const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length
