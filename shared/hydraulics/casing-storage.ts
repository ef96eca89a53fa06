import type { Finding, Series } from './analysis.ts'

/** Multiples of r_c²/T. Source: Papadopulos & Cooper 1967. */
export const CASING_STORAGE = { drawdown: 25, straightLine: 250 }

/**
 * Times after which water stored in the casing no longer matters at the pumped well: for drawdown within 3 %
 * (25 r_c²/T) and before a straight line may be trusted (250 r_c²/T).
 * @param casingRadius_m inner radius where the level moves; `riserRadius_m` outer radius of a riser pipe in it
 */
export function casingStorageTimes(T: number, casingRadius_m: number, { riserRadius_m = 0 } = {}) {
  if (!(T > 0) || !(casingRadius_m > riserRadius_m)) throw new RangeError('Casing storage needs T and a casing radius')
  const area = casingRadius_m ** 2 - riserRadius_m ** 2
  return { drawdown_s: (CASING_STORAGE.drawdown * area) / T, straightLine_s: (CASING_STORAGE.straightLine * area) / T }
}

/** Judges the first reading used at a pumped well against casing storage. */
export function casingFinding(
  T: number,
  series: Pick<Series, 'label' | 'casingRadius_m'>,
  from_s: number,
  use: keyof typeof CASING_STORAGE,
): Finding {
  if (series.casingRadius_m === null || !(series.casingRadius_m > 0)) {
    return { code: 'casing-unknown', severity: 'caution', params: { well: series.label } }
  }
  const times = casingStorageTimes(T, series.casingRadius_m)
  const over_s = use === 'drawdown' ? times.drawdown_s : times.straightLine_s
  const past = from_s >= over_s
  return {
    code: past ? 'casing-storage-over' : 'casing-storage',
    severity: past ? 'good' : 'caution',
    params: { well: series.label, from_s, over_s },
  }
}
