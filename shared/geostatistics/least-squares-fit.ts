import { variogramModel, VARIOGRAM_MODEL_IDS, type VariogramModelId } from './catalogue.ts'
import { GeostatisticsError } from './errors.ts'
import type { Lag } from './experimental.ts'
import type { Variogram } from './variogram.ts'

export interface LeastSquaresFit {
  variogram: Variogram
  /** Σ N(h)/h² (γ̂ − γ)² at the fit. */
  objective: number
  /** Share of the weighted scatter of the lags about their mean that the curve explains, at most 1. */
  explained: number
  /** The unbounded fit had a nugget below zero: the assumed errors exceed the observed scatter. */
  nuggetBelowZero: boolean
}

interface LinearPart {
  nugget: number
  sill: number
  objective: number
  freeNugget: number
}

const weightOf = (lag: Lag): number => lag.pairs / Math.max(lag.distance, 1e-9) ** 2

/** Best nugget and sill, both ≥ 0, for one range: least squares in two unknowns, then along the edges when outside. */
function linearPart(lags: readonly Lag[], model: VariogramModelId, range: number): LinearPart {
  const { correlation } = variogramModel(model)
  let w = 0
  let wf = 0
  let wff = 0
  let wg = 0
  let wfg = 0
  const rise = lags.map((lag) => 1 - correlation(lag.distance / range))
  lags.forEach((lag, i) => {
    const weight = weightOf(lag)
    const f = rise[i]!
    w += weight
    wf += weight * f
    wff += weight * f * f
    wg += weight * lag.gamma
    wfg += weight * f * lag.gamma
  })
  const objective = (nugget: number, sill: number): number =>
    lags.reduce((sum, lag, i) => sum + weightOf(lag) * (lag.gamma - nugget - sill * rise[i]!) ** 2, 0)
  const determinant = w * wff - wf * wf
  const flat = !(determinant > 1e-12 * w * wff)
  const sill = flat ? 0 : (w * wfg - wf * wg) / determinant
  const freeNugget = (wg - sill * wf) / w
  const candidates = [
    [Math.max(0, wg / w), 0],
    [0, Math.max(0, wff > 0 ? wfg / wff : 0)],
    ...(sill >= 0 && freeNugget >= 0 ? [[freeNugget, sill]] : []),
  ] as [number, number][]
  const scored = candidates.map(([n, s]) => ({ nugget: n, sill: s, objective: objective(n, s), freeNugget }))
  return scored.reduce((best, next) => (next.objective < best.objective ? next : best))
}

/** Golden-section search on the logarithm of the range between two starts around a good one. */
function refineRange(score: (logRange: number) => number, from: number, to: number): number {
  const golden = (Math.sqrt(5) - 1) / 2
  let [a, b] = [from, to]
  for (let i = 0; i < 60 && b - a > 1e-9; i++) {
    const c = b - golden * (b - a)
    const d = a + golden * (b - a)
    if (score(c) < score(d)) b = d
    else a = c
  }
  return (a + b) / 2
}

const STARTS = 24

function fitModel(lags: readonly Lag[], model: VariogramModelId): LeastSquaresFit {
  const shortest = Math.log(Math.max(lags[0]!.distance, 1e-6))
  const longest = Math.log(lags[lags.length - 1]!.distance * 3)
  const step = (longest - shortest) / (STARTS - 1)
  const score = (logRange: number): number => linearPart(lags, model, Math.exp(logRange)).objective
  const starts = Array.from({ length: STARTS }, (_, i) => shortest + i * step)
  const best = starts.reduce((kept, next) => (score(next) < score(kept) ? next : kept))
  const range = Math.exp(refineRange(score, Math.max(shortest, best - step), Math.min(longest, best + step)))
  const { nugget, sill, objective, freeNugget } = linearPart(lags, model, range)
  const weights = lags.reduce((sum, lag) => sum + weightOf(lag), 0)
  const mean = lags.reduce((sum, lag) => sum + weightOf(lag) * lag.gamma, 0) / weights
  const scatter = lags.reduce((sum, lag) => sum + weightOf(lag) * (lag.gamma - mean) ** 2, 0)
  const explained = scatter > 0 ? 1 - objective / scatter : 0
  return { variogram: { model, nugget, sill, range }, objective, explained, nuggetBelowZero: freeNugget < 0 }
}

/**
 * Fits nugget, sill and range to an experimental variogram with weights N(h)/h², from many starting ranges, and returns
 * one fit per family, best first (Cressie 1985; Zimmerman & Zimmerman 1991 for the weights).
 * @throws GeostatisticsError `too-few` with fewer than three lags.
 */
export function fitLeastSquares(
  lags: readonly Lag[],
  models: readonly VariogramModelId[] = VARIOGRAM_MODEL_IDS,
): LeastSquaresFit[] {
  if (lags.length < 3) throw new GeostatisticsError('too-few', 'a variogram fit needs three lags')
  return models.map((model) => fitModel(lags, model)).sort((a, b) => a.objective - b.objective)
}
