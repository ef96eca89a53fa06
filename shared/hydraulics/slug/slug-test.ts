import { AnalysisError } from '../analysis-error.ts'
import type { HandLine, LeftOut, LeftOutReason } from '../analysis.ts'
import type { ShapeFactorId } from './shape-factors.ts'

/** One slug: the level moved at once, and came back. */
export interface SlugRepeat {
  /** Stands where other tests have the well: in residuals, curves and readings left out. */
  id: string
  label: string
  /** Displacement at time zero; above the static level positive (falling head), below it negative (rising head). */
  initial_m: number
  /** Time since the level was moved. */
  elapsed_s: number[]
  /** Displacement from the static level, of the sign of `initial_m`. */
  displacement_m: number[]
  included: boolean[]
}

/** A slug test in one well, all in SI. */
export interface SlugInputs {
  version: 1
  wellId: string
  label: string
  repeats: SlugRepeat[]
  /** Inner radius of the casing in which the level moves. */
  casingRadius_m: number
  /** Radius of the bore. */
  wellRadius_m: number
  /** Radius of the screen. */
  screenRadius_m: number
  screenLength_m: number
  /** Depth of the screen's top below the water table or static level; negative when the level stands in the screen. */
  screenTop_m: number
  /** Saturated thickness of the aquifer; null: not known. */
  thickness_m: number | null
  /** Relative standard deviation of the thickness. */
  thicknessError: number
  /** Outer radius and drainable porosity of the filter pack; null: none. */
  filterPack: { radius_m: number; porosity: number } | null
  /** Relative standard deviation of the casing radius, which counts twice in K. */
  radiusError: number
  /** Vertical over horizontal conductivity; 1: alike. */
  anisotropy: number
  aquifer: 'confined' | 'leaky' | 'unconfined'
  /** Storativity assumed where a method needs one, with the standard deviation of its log10. */
  storage: { value: number; logSd: number }
}

export interface SlugOptions {
  /** Repeats used; null: all. */
  repeatIds: string[] | null
  /** Normalised heads H/H0 between which the line is drawn; null: those of the method. */
  heads?: { from: number; to: number } | null
  /** Replaces the regression for a single repeat: −log10(H/H0) on seconds. */
  line?: HandLine | null
  shape?: ShapeFactorId
  /** Most readings used in each factor of ten in time by curve methods; null: all. Default 50. */
  readingsPerCycle?: number | null
}

/** Readings of one repeat in order of time, as shares of the initial displacement. */
export interface Heads {
  repeat: SlugRepeat
  time_s: number[]
  head: number[]
}

const dimensions = ['casingRadius_m', 'wellRadius_m', 'screenRadius_m', 'screenLength_m', 'anisotropy'] as const

/** @throws AnalysisError for a dimension that is missing or not positive, or a filter pack thinner than its screen */
export function checkDimensions(inputs: SlugInputs): void {
  const wrong = dimensions.find((name) => !(inputs[name] > 0 && Number.isFinite(inputs[name])))
  if (wrong) throw new AnalysisError('analysis/dimension', { dimension: wrong })
  if (!Number.isFinite(inputs.screenTop_m) || -inputs.screenTop_m >= inputs.screenLength_m) {
    throw new AnalysisError('analysis/dimension', { dimension: 'screenTop_m' })
  }
  const pack = inputs.filterPack
  if (pack && !(pack.radius_m > inputs.screenRadius_m && pack.porosity > 0 && pack.porosity < 1)) {
    throw new AnalysisError('analysis/dimension', { dimension: 'filterPack' })
  }
}

/** @throws AnalysisError without a storativity where a method has to assume one */
export function checkStorage({ storage }: SlugInputs): void {
  if (!(storage.value > 0 && storage.logSd >= 0))
    throw new AnalysisError('analysis/dimension', { dimension: 'storage' })
}

/**
 * Normalised heads of the repeats chosen.
 * @throws AnalysisError without a repeat, for an unknown one, uneven columns or an initial displacement of zero
 */
export function normalisedHeads(
  inputs: SlugInputs,
  { repeatIds }: SlugOptions,
): { heads: Heads[]; leftOut: LeftOut[] } {
  const chosen = repeatIds === null ? inputs.repeats : repeatIds.map((id) => repeatOf(inputs, id))
  if (chosen.length === 0) throw new AnalysisError('analysis/no-repeats')
  const leftOut: LeftOut[] = []
  const heads = chosen.map((repeat) => {
    checkRepeat(repeat)
    const counts = new Map<LeftOutReason, number>()
    const kept = repeat.elapsed_s.flatMap((time, i) => {
      const reason = reasonAgainst(repeat, time, i)
      if (reason) counts.set(reason, (counts.get(reason) ?? 0) + 1)
      return reason ? [] : [{ time, head: (repeat.displacement_m[i] as number) / repeat.initial_m }]
    })
    kept.sort((a, b) => a.time - b.time)
    counts.forEach((count, reason) => leftOut.push({ wellId: repeat.id, count, reason }))
    return { repeat, time_s: kept.map(({ time }) => time), head: kept.map(({ head }) => head) }
  })
  return { heads, leftOut }
}

function repeatOf({ repeats }: SlugInputs, id: string): SlugRepeat {
  const found = repeats.find((repeat) => repeat.id === id)
  if (!found) throw new AnalysisError('analysis/no-repeats')
  return found
}

function checkRepeat({ id, label, initial_m, elapsed_s, displacement_m, included }: SlugRepeat): void {
  if (elapsed_s.length !== displacement_m.length || elapsed_s.length !== included.length) {
    throw new AnalysisError('analysis/uneven-series', { wellId: id })
  }
  if (!(Math.abs(initial_m) > 0) || !Number.isFinite(initial_m)) {
    throw new AnalysisError('analysis/initial-head', { repeat: label })
  }
}

function reasonAgainst({ included, displacement_m }: SlugRepeat, time: number, i: number): LeftOutReason | null {
  if (!included[i]) return 'excluded'
  if (!Number.isFinite(time) || !Number.isFinite(displacement_m[i])) return 'not-finite'
  return time > 0 ? null : 'outside-phase'
}
