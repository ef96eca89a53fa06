import type { AnalysisInputs, AnalysisOptions, FittedCurve, MethodOutcome } from './analysis.ts'
import type { CurveShift } from './laid-curve.ts'
import type { Requirement } from './requirements.ts'

/** A quantity that a method finds. Bounds are those of the search, far outside what may be adopted. */
export interface Unknown {
  id: string
  label: string
  dimension: 'transmissivity' | 'conductivity' | 'length' | 'time' | 'dimensionless'
  low: number
  high: number
  scale: 'log' | 'linear'
}

interface OptionBase {
  name: Exclude<keyof AnalysisOptions, 'wellIds'>
  label: string
}

/** Description of one option, from which forms and request schemas are built. */
export type OptionSpec = OptionBase &
  (
    | { kind: 'window'; axis: 'elapsed' | 'since-stop' }
    | { kind: 'line'; abscissa: 'elapsed' | 'distance' | 'time-ratio' }
    | { kind: 'match'; shift: CurveShift }
    | { kind: 'choice'; values: readonly string[]; default: string }
    | { kind: 'flag'; default: boolean }
    | { kind: 'answer' }
    | { kind: 'boundaries'; most: number }
    | { kind: 'number'; dimension: 'time' | 'count'; low: number; high: number; default: number | null }
  )

/** A condition under which the method may be believed; broken ones come back as findings with this code. */
export interface ValidityRule {
  code: string
  statement: string
  source: string
}

/** How a method reads a test, for menus. */
export type Family = 'line' | 'curve' | 'recovery' | 'steady'

export interface Method {
  id: string
  label: string
  version: number
  source: string
  family: Family
  /** Kinds of aquifer that it is made for. */
  aquifers: readonly AnalysisInputs['aquifer'][]
  needs: {
    phase: 'pumping' | 'recovery'
    wells: { least: number; most: number | null; roles: readonly ('pumped' | 'observation')[] }
    /** What has to be known of aquifer and wells beside the readings. */
    known?: readonly Requirement[]
  }
  unknowns: readonly Unknown[]
  options: readonly OptionSpec[]
  validity: readonly ValidityRule[]
  run(inputs: AnalysisInputs, options: AnalysisOptions): MethodOutcome
  /** Drawdown of the fitted model at elapsed times, for drawing. */
  curve(inputs: AnalysisInputs, options: AnalysisOptions, outcome: MethodOutcome, times_s: number[]): FittedCurve[]
}

export const transmissivity: Unknown = {
  id: 'T',
  label: 'Transmissivity',
  dimension: 'transmissivity',
  low: 1e-12,
  high: 1e2,
  scale: 'log',
}

/** Bounds reach far out because at a pumped well the fitted S takes up the skin. */
export const storativity: Unknown = {
  id: 'S',
  label: 'Storativity',
  dimension: 'dimensionless',
  low: 1e-30,
  high: 1e6,
  scale: 'log',
}

export const sharedOptions = {
  window: { name: 'window', label: 'Time window', kind: 'window', axis: 'elapsed' },
  thinning: { name: 'thinning', label: 'Correct for thinning of the aquifer', kind: 'flag', default: false },
  afterDrainage: { name: 'afterDrainage', label: 'Window lies after delayed drainage', kind: 'answer' },
  readingsPerCycle: {
    name: 'readingsPerCycle',
    label: 'Most readings per factor of ten in time',
    kind: 'number',
    dimension: 'count',
    low: 2,
    high: 10_000,
    default: 50,
  },
} as const satisfies Record<string, OptionSpec>
