import type { CrossValidation } from '#shared/geostatistics/coverage.ts'
import type { Lag } from '#shared/geostatistics/experimental.ts'
import type { LeastSquaresFit } from '#shared/geostatistics/least-squares-fit.ts'
import type { Component } from '#shared/geostatistics/mixture.ts'
import type { Point, Polyline } from '#shared/geostatistics/planar.ts'
import type { VariogramNode } from '#shared/geostatistics/posterior.ts'
import type { Variogram } from '#shared/geostatistics/variogram.ts'
import type { Note, NoteCode } from './note-types.ts'

export type { Point, Polyline }

/** Transmissivity (m²/s), elastic storativity, specific yield, hydraulic conductivity (m/s). */
export type Quantity = 'T' | 'S' | 'Sy' | 'K'

/** How well a value is grounded. */
export type Evidence = 'firm' | 'fair' | 'slight'

/** Class of storage, from the response of the test, not from the unit. */
export type StorageClass = 'elastic' | 'specific-yield' | 'apparent' | 'unclassified'

/** Where the drawdown was measured: decides whether a storage value may be believed. */
export type ValueOrigin = 'observation-well' | 'pumped-well' | 'slug-test' | 'other'

/** One adopted value of one unit and quantity. Coordinates in the region's projected system, metres. */
export interface SiteValue {
  id: string
  testId: string
  wellId: string
  label: string
  x: number
  y: number
  /** log10 of the value in SI. */
  log10: number
  /** Standard deviation of log10, above zero. */
  error: number
  evidence: Evidence
  /** Id of the method of analysis. */
  method: string
  origin: ValueOrigin
  year: number | null
  /** null for quantities other than S and Sy. */
  storageClass: StorageClass | null
  /** The tested interval spans several units. */
  composite: boolean
  /** A composite value whose share for this unit was settled. */
  apportioned: boolean
  positionAccuracy_m: number
  screenTop_m?: number | null
  screenBottom_m?: number | null
}

/** A value as it enters statistics: one per well, with the values it was pooled from. */
export interface UsedValue extends SiteValue {
  memberIds: string[]
  testIds: string[]
}

export type ExclusionReason = 'not-finite' | 'beyond-limits' | 'composite' | 'storage-class' | 'storage-origin'

export interface Exclusion {
  id: string
  reason: ExclusionReason
}

export interface UnitOutline {
  name: string
  /** The administrator's kind of unit, shown only. */
  kind: string
  /** Rings in projected metres: holes and separate parts by the even-odd rule. */
  outline: readonly Polyline[]
  byOutlineOnly: boolean
}

export interface StreamNearby {
  name: string
  distance_m: number
}

/** What is known about a place beside the values. */
export interface EstimateContext {
  unit: UnitOutline
  quantity: Quantity
  /** Barriers of this unit, projected metres. */
  barriers: readonly Polyline[]
  streams: readonly StreamNearby[]
  coastDistance_m?: number | null
  /** Depth below ground that the question is about. */
  depth_m?: number | null
  /** Overrides the model's own, when the server keeps it apart. */
  crossValidation?: CrossValidation | null
  yearNow: number
  /** The values changed since the model was fitted, and a new fit is under way. */
  modelOutdated?: boolean
  /** Error of log10 that a new test would have; default by quantity. */
  newTestError?: number
}

/** How the amount of data decided what is done (methods: how much data). */
export type DataRule = 'none' | 'mean' | 'assumed' | 'isotropic'

/** The fitted model of one unit and quantity over one set of values. Plain JSON. */
export interface UnitModel {
  version: 1
  quantity: Quantity
  rule: DataRule
  /** Values used, after pooling. */
  n: number
  /** Independent sites among them. */
  sites: number
  /** Variogram to draw and to name; null when the rule needs none. */
  variogram: Variogram | null
  /** Variograms that intervals average over. */
  nodes: VariogramNode[]
  /** The weighted least-squares alternative. */
  leastSquares: LeastSquaresFit | null
  /** Matheron's lags, known errors removed. */
  experimental: Lag[]
  /** Cressie and Hawkins' lags, known errors removed. */
  robust: Lag[]
  /** Assumed errors exceed the observed scatter at short distance. */
  errorsExceedScatter: boolean
  /** Who or what an assumed variogram rests on. */
  assumedFrom: string | null
  /** Factor on the standard deviation from cross-validation. */
  spreadFactor: number
  crossValidation: CrossValidation | null
}

/** A distribution of log10, with the quantiles that are shown. */
export interface Log10Distribution {
  median: number
  low80: number
  high80: number
  low95: number
  high95: number
  /** The distribution itself, for quantiles and draws. */
  components: Component[]
}

export interface Contribution {
  valueId: string
  testId: string
  wellId: string
  label: string
  distance_m: number
  /** Grid bearing from the place to the value, degrees from north. */
  bearing_deg: number
  weight: number
  log10: number
  error: number
  evidence: Evidence
  year: number | null
}

export interface SecondOpinion {
  log10: number
  /** Larger over smaller of the two estimates, ≥ 1. */
  ratio: number
}

export interface NeighbourScatter {
  n: number
  /** Standard deviation of log10. */
  deviation: number
}

export type Support = 'well' | 'partly' | 'weakly' | 'none'

export interface EstimateResult {
  version: 1
  quantity: Quantity
  place: Point
  rule: DataRule
  n: number
  sites: number
  /** The true value at the place; null when there is no estimate. */
  truth: Log10Distribution | null
  /** What a new test there would show. */
  newTest: Log10Distribution | null
  /** By falling weight; the nearest values, with weight 0, when there is no estimate. */
  contributions: Contribution[]
  secondOpinion: SecondOpinion | null
  neighbours: NeighbourScatter | null
  excluded: Exclusion[]
  notes: Note[]
  support: Support
  /** Codes of the notes that decided the support. */
  supportBecause: NoteCode[]
}
