import type { FittedCurve, MethodOutcome, ParameterEstimate } from './analysis.ts'
import type { ValidityRule } from './method.ts'

/** What a method of any kind of test returns. K stands where the test gives conductivity itself, as a slug test does. */
export interface KindOutcome extends MethodOutcome {
  K?: ParameterEstimate | null
}

/** A quantity that a method of any kind finds. */
export interface Found {
  id: string
  label: string
  /** Dimension of the quantity catalogue, or the unit itself where there is none, such as s/m². */
  dimension: string
}

/** Description of one option, from which forms and request schemas are built. */
export type KindOption<Options> = { name: keyof Options & string; label: string } & (
  | { kind: 'choice'; values: readonly string[]; default: string }
  | { kind: 'flag'; default: boolean }
  | { kind: 'number'; dimension: string; low: number; high: number; default: number | null }
  | { kind: 'heads'; default: { from: number; to: number } }
  | { kind: 'line' }
  | { kind: 'repeats' }
)

/** One way to analyse a kind of test; of the shape of `Method`, with inputs and options of its own. */
export interface KindMethod<Inputs, Options> {
  id: string
  label: string
  version: number
  source: string
  unknowns: readonly Found[]
  options: readonly KindOption<Options>[]
  validity: readonly ValidityRule[]
  /** @throws AnalysisError for inputs the method refuses */
  run(inputs: Inputs, options: Options): KindOutcome
  /** Fitted model at times on the clock of the readings, one entry per series, for drawing. */
  curve(inputs: Inputs, options: Options, outcome: KindOutcome, times_s: number[]): FittedCurve[]
}

/** A kind of test: what is brought, and in which ways it may be analysed. */
export interface Kind<Inputs, Options> {
  id: string
  label: string
  methods: Readonly<Record<string, KindMethod<Inputs, Options>>>
}
