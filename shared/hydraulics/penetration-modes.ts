import { besselK0, besselK1 } from '#shared/numerics/bessel.ts'
import { AnalysisError } from './analysis-error.ts'
import type { Interval } from './analysis.ts'
import type { ResponsePlace } from './place.ts'

/** Modes whose K0 is below e^-36 are nothing beside the rest; so many are summed at the most. */
const FARTHEST = 36
const MOST_MODES = 50_000

/** Vertical modes n = 1, 2, … of a place; index 0 belongs to n = 1. */
export interface PenetrationModes {
  /** 2·Aₙ·A'ₙ, with Aₙ the mean of cos(nπz/b) over the open part of the pumped well, A'ₙ over that of the place. */
  weights: Float64Array
  /** √((r/B)² + (n·spacing)²), the r/B of the mode. */
  rhos: Float64Array
  /** (n·spacing)²/ρₙ², the share of the vertical flow in the mode. */
  shares: Float64Array
  /** Sums over this mode and all above of the steady terms 2K0(ρₙ): value, derivatives by ln(Kz/Kr) and ln(r/B). */
  steady: { value: Float64Array; byAnisotropy: Float64Array; byLeakage: Float64Array }
}

interface Kept {
  anisotropy: number
  leakage: number
  modes: PenetrationModes
}

/** The modes last made for a place: a fit with a known anisotropy asks for the same ones at every step. */
const kept = new WeakMap<ResponsePlace, Kept>()

/**
 * @param anisotropy Kz/Kr
 * @param leakage r/B, 0 in a confined aquifer
 * @throws AnalysisError without thickness, without any screen, or with a screen outside the aquifer
 */
export function penetrationModes(place: ResponsePlace, anisotropy: number, leakage: number): PenetrationModes {
  const known = kept.get(place)
  if (known && known.anisotropy === anisotropy && known.leakage === leakage) return known.modes
  const modes = makeModes(place, anisotropy, leakage)
  kept.set(place, { anisotropy, leakage, modes })
  return modes
}

function makeModes(place: ResponsePlace, anisotropy: number, leakage: number): PenetrationModes {
  const thickness = thicknessOf(place)
  const [pumped, observed] = screensOf(place, thickness)
  const spacing = (Math.PI * place.distance_m * Math.sqrt(anisotropy)) / thickness
  const count = Math.min(MOST_MODES, Math.ceil(FARTHEST / spacing))
  const weights = Float64Array.from(
    { length: count },
    (_, i) => 2 * meanCosine(i + 1, pumped, thickness) * meanCosine(i + 1, observed, thickness),
  )
  const rhos = Float64Array.from({ length: count }, (_, i) => Math.hypot(leakage, (i + 1) * spacing))
  const shares = rhos.map((rho, i) => (((i + 1) * spacing) / rho) ** 2)
  return { weights, rhos, shares, steady: steadySums(weights, rhos, shares) }
}

function steadySums(weights: Float64Array, rhos: Float64Array, shares: Float64Array): PenetrationModes['steady'] {
  const count = weights.length
  const [value, byAnisotropy, byLeakage] = [0, 1, 2].map(() => new Float64Array(count + 1)) as [
    Float64Array,
    Float64Array,
    Float64Array,
  ]
  for (let i = count - 1; i >= 0; i--) {
    const weight = weights[i] as number
    const rho = rhos[i] as number
    const share = shares[i] as number
    const slope = weight === 0 ? 0 : -2 * weight * rho * besselK1(rho)
    value[i] = (value[i + 1] as number) + (weight === 0 ? 0 : 2 * weight * besselK0(rho))
    byAnisotropy[i] = (byAnisotropy[i + 1] as number) + (slope * share) / 2
    byLeakage[i] = (byLeakage[i + 1] as number) + slope * (1 - share)
  }
  return { value, byAnisotropy, byLeakage }
}

/** Mean of cos(nπz/b) over an interval; over the whole thickness it is zero. */
function meanCosine(n: number, { top_m, bottom_m }: Interval, thickness_m: number): number {
  const wave = (n * Math.PI) / thickness_m
  const half = (wave * (bottom_m - top_m)) / 2
  return Math.cos((wave * (top_m + bottom_m)) / 2) * (half < 1e-8 ? 1 : Math.sin(half) / half)
}

function thicknessOf({ thickness_m }: ResponsePlace): number {
  if (thickness_m === null || !(thickness_m > 0)) throw new AnalysisError('analysis/penetration-thickness')
  return thickness_m
}

/** Open parts of pumped well and place inside the aquifer; a missing one is open over all of it. */
function screensOf(place: ResponsePlace, thickness_m: number): [pumped: Interval, observed: Interval] {
  const { pumped, pumpedScreen } = place
  const observedScreen = place.observedScreen ?? (pumped ? pumpedScreen : null)
  if (!pumpedScreen && !observedScreen) throw new AnalysisError('analysis/penetration-screens')
  const [one, other] = [pumpedScreen, observedScreen].map((screen) => insideAquifer(screen, thickness_m))
  return [one as Interval, other as Interval]
}

function insideAquifer(screen: Interval | null, thickness_m: number): Interval {
  if (!screen) return { top_m: 0, bottom_m: thickness_m }
  const inside = { top_m: Math.max(0, screen.top_m), bottom_m: Math.min(thickness_m, screen.bottom_m) }
  if (inside.bottom_m >= inside.top_m) return inside
  throw new AnalysisError('analysis/screen-outside', { top_m: screen.top_m, bottom_m: screen.bottom_m, thickness_m })
}
