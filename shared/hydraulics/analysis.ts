import type { MethodId } from './catalogue.ts'
import type { AppliedCorrection } from './corrections/correction.ts'
import type { CurveMatch } from './laid-curve.ts'

/** A step of the pumping rate; a step with rate 0 is the stop. Times in seconds on the clock of `elapsed_s`. */
export interface RateStep {
  start_s: number
  rate_m3_s: number
}

/** Depths below the top of the aquifer. */
export interface Interval {
  top_m: number
  bottom_m: number
}

export interface Series {
  wellId: string
  label: string
  role: 'pumped' | 'observation'
  /** Distance from the pumped well; ignored for the pumped well itself. */
  distance_m: number
  distanceSd_m: number
  wellRadius_m: number | null
  /** Inner radius of the casing in which the water level moves, the riser's area taken off. */
  casingRadius_m: number | null
  /** Direction from the pumped well, degrees clockwise from north; left out or null: not known. */
  bearing_deg?: number | null
  /** Open part of the well; left out or null: all of the aquifer. A point has top and bottom alike. */
  screen?: Interval | null
  elapsed_s: number[]
  drawdown_m: number[]
  included: boolean[]
  /** Drawdown counts from the mean of the included readings before pumping; left out: from the level as pumping began. */
  zero?: 'mean-before'
  /** What was taken off the drawdown before; left out: nothing. */
  corrections?: AppliedCorrection[]
}

/** Another well that pumped before or during the test. */
export interface OtherWell {
  /** Of the map; null for a place that was typed. */
  wellId: string | null
  label: string
  /** On the clock of the test; may begin before it. */
  rates: RateStep[]
  /** One factor on its rates is an unknown of the fit; otherwise they are taken as they are. */
  fitted: boolean
  /** Where it stands, as seen from the pumped well. */
  distance_m: number
  bearing_deg: number
  /** How far it is from each well of the test. */
  distances: { wellId: string; distance_m: number }[]
}

/** Everything an analysis depends on, all in SI; stored as the analysis's snapshot. */
export interface AnalysisInputs {
  version: 1
  rates: RateStep[]
  /** Relative standard deviation of the rate, 0.05 unless known better. */
  rateError: number
  series: Series[]
  /** Construction of the pumped well, for tests in which its own level is not among the series. */
  pumpedWell?: Pick<Series, 'wellRadius_m' | 'casingRadius_m' | 'screen'>
  aquifer: 'confined' | 'leaky' | 'unconfined'
  thickness_m: number | null
  thicknessBasis: 'aquifer' | 'screen' | 'saturated' | 'unknown'
  /** Relative standard deviation of the thickness. */
  thicknessError: number
  /** Distance to a connected stream, null where there is none. */
  streamDistance_m: number | null
  /** Superposed by curve methods; left out: none is known. */
  otherWells?: OtherWell[]
}

export interface TimeWindow {
  from_s: number
  to_s: number
}

/** A stream or barrier that an analysis takes into account. */
export interface ChosenBoundary {
  kind: 'recharge' | 'barrier'
  /** Shortest distance from the pumped well; null: to be fitted. */
  distance_m: number | null
  /** Direction of the shortest way, degrees clockwise from north. */
  bearing_deg: number
}

/** A straight line drawn by hand: drawdown in metres on log10 of the method's abscissa (seconds, metres or t/t'). */
export interface HandLine {
  slope: number
  intercept: number
}

export interface AnalysisOptions {
  wellIds: string[]
  /** Elapsed time, or for recovery the time since the stop; null lets the method choose (curve methods: all readings). */
  window: TimeWindow | null
  /** Replaces the regression of straight-line methods. Default null. */
  line?: HandLine | null
  /** A curve laid over the readings by hand, by the ids of its unknowns; replaces the search of curve methods. Default null. */
  match?: CurveMatch | null
  /** What the least squares of curve methods are taken of. Default 'drawdown'. */
  objective?: 'drawdown' | 'log-drawdown'
  /** How readings far off the curve count in curve methods: like all others, or less (Huber). Default 'equal'. */
  weighting?: 'equal' | 'huber'
  /** Replace s by s − s²/2b in an unconfined aquifer. Default false. */
  thinning?: boolean
  /** The analyst's word that the window lies after delayed drainage; null: judged by its end (72 h). Default null. */
  afterDrainage?: boolean | null
  /** Most readings used in each factor of ten in time, per well; null uses all. Default 50. */
  readingsPerCycle?: number | null
  /** Edges of the aquifer, at most two; curve methods stand image wells for them. Default none. */
  boundaries?: ChosenBoundary[]
  /** Readings a curve method fits: those during pumping, or recovery too, by superposition. Default 'pumping'. */
  phase?: 'pumping' | 'all'
  /** Moment at which distance–drawdown compares the wells; null: the last moment common to all. Default null. */
  time_s?: number | null
  /** How recovery treats a rate that varied. Default 'superposition'; 'equivalent': tp = volume / last rate. */
  rateHistory?: 'superposition' | 'equivalent'
}

/** A positive quantity with its 95 % interval; `logSd` is the standard deviation of log10. */
export interface ParameterEstimate {
  value: number
  low: number
  high: number
  logSd: number
  /** False when the interval is too wide for the value to mean anything. */
  determined: boolean
}

/** A quantity found beside T and S: leakage, anisotropy, skin, a distance. `determined` as for T and S. */
export interface OtherEstimate {
  id: string
  value: number
  low: number
  high: number
  determined: boolean
}

/** A statement about a result: a code with SI parameters; the sentence is in shared/words/findings.ts. */
export interface Finding {
  code: string
  severity: 'good' | 'note' | 'caution' | 'bad'
  params: Record<string, number | string>
}

export type StorageClass = 'elastic' | 'specific-yield' | 'apparent' | 'unclassified'

export type LeftOutReason =
  | 'excluded'
  | 'not-finite'
  | 'outside-phase'
  | 'outside-window'
  | 'not-positive'
  | 'thinned'
  | 'pumped-well'
  | 'not-measured'

export interface LeftOut {
  wellId: string
  count: number
  reason: LeftOutReason
}

export interface Residual {
  wellId: string
  elapsed_s: number
  /** Measured − calculated drawdown. */
  residual_m: number
  /** How many fitted readings this one stands for where residuals were thinned; left out: itself alone. */
  standsFor?: number
}

/** A well whose residuals are too many to be kept: the result holds some of them. */
export interface ResidualsShown {
  wellId: string
  residualsShown: number
  of: number
}

export interface KeptResiduals {
  residuals: Residual[]
  /** Wells whose residuals were thinned; left out where none were. The summary of the fit is of all readings. */
  residualsShown?: ResidualsShown[]
}

export interface FitSummary {
  n: number
  effectiveN: number
  rmse_m: number
  autocorrelation: number
  iterations: number
  converged: boolean
  singular: boolean
  /** Sum of squared residuals of the objective, of those weighed less by Huber's function. */
  objective: number
  /** Correlation of ln T and ln S. */
  correlation?: number
  /** Readings so far off that they were weighed less; left out where all weighed the same. */
  weighedLess?: number
  /** Akaike's criterion for small samples, from the effective number of readings; null where too few for it. */
  aicc?: number | null
}

/** What a method's `run` returns; `analyse` adds which method it was. */
export interface MethodOutcome {
  T: ParameterEstimate | null
  S: ParameterEstimate | null
  storageClass: StorageClass | null
  /** What the method found beside T and S, in the order of its unknowns. */
  others?: OtherEstimate[]
  /** Further numbers by name: slope, intercept, distances, the window used (window_from_s, window_to_s). */
  extras: Record<string, number>
  residuals: Residual[]
  fit: FitSummary
  findings: Finding[]
  leftOut: LeftOut[]
}

export interface AnalysisResult extends MethodOutcome, KeptResiduals {
  version: 1
  method: MethodId
  methodVersion: number
  K: ParameterEstimate | null
}

/** Drawdown of the fitted model in one well, at the times asked for; null where the model says nothing. */
export interface FittedCurve {
  wellId: string
  drawdown_m: (number | null)[]
}
