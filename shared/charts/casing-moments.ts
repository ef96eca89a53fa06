import { CASING_STORAGE, casingStorageTimes } from '#shared/hydraulics/casing-storage.ts'
import type { Fit } from './fit-band.ts'
import type { TimePlot } from './time-plot.ts'

/** A moment on the time axis that has a name. */
export interface Moment {
  x: number
  label: string
}

/**
 * When casing storage no longer matters at the pumped well, by the transmissivity that was found: 25 and 250 r_c²/T,
 * counted from `origin_s`. Empty where the plot does not show that well, or its casing is not known.
 */
export function casingMoments(
  { kind, wells, x, clock }: TimePlot,
  { inputs, result: { T } }: Fit,
  origin_s: number,
): Moment[] {
  const shown = wells.find(({ role }) => role === 'pumped')
  const casing_m = inputs.series.find(({ wellId }) => wellId === shown?.wellId)?.casingRadius_m ?? 0
  if (kind === 'linear' || clock.origin_s !== origin_s || !T || !(T.value > 0) || !(casing_m > 0)) return []
  const { drawdown_s, straightLine_s } = casingStorageTimes(T.value, casing_m)
  const named = [
    [drawdown_s, `${CASING_STORAGE.drawdown} r_c²/T`],
    [straightLine_s, `${CASING_STORAGE.straightLine} r_c²/T`],
  ] as const
  return named.flatMap(([time_s, label]) => {
    const at = clock.place(origin_s + time_s)
    return at !== null && at > x.min && at < x.max ? [{ x: at, label }] : []
  })
}
