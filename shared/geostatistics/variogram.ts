import { VARIOGRAM_MODELS, variogramModel, type VariogramModelId } from './catalogue.ts'
import { GeostatisticsError } from './errors.ts'

/** Nugget plus one structure. Variances in squared units of the data (log10 ²), range in metres. */
export interface Variogram {
  model: VariogramModelId
  nugget: number
  /** Partial sill: what the structure adds to the nugget. */
  sill: number
  /** Practical range: where the structure has reached (95 % of) its sill. */
  range: number
}

/** @throws GeostatisticsError when a parameter is not a possible one. */
export function checkVariogram(v: Variogram): void {
  const possible = v.model in VARIOGRAM_MODELS && v.nugget >= 0 && v.sill >= 0 && v.range > 0
  if (!possible || !Number.isFinite(v.nugget + v.sill + v.range)) {
    throw new GeostatisticsError('bad-input', `not a variogram: ${JSON.stringify(v)}`)
  }
}

/** Covariance of the structure alone at distance h; the nugget belongs to the caller, who knows what coincides. */
export const structureCovariance = (v: Variogram, h: number): number =>
  v.sill * variogramModel(v.model).correlation(h / v.range)

/** Semivariance at distance h; 0 at 0, the nugget just beyond. */
export const semivariance = (v: Variogram, h: number): number =>
  h === 0 ? 0 : v.nugget + v.sill - structureCovariance(v, h)

export const totalSill = (v: Variogram): number => v.nugget + v.sill
