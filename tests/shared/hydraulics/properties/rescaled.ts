import type { AnalysisInputs, AnalysisOptions, ChosenBoundary, Interval } from '#shared/hydraulics/analysis.ts'
import type { Unknown } from '#shared/hydraulics/method.ts'
import type { ResponsePlace } from '#shared/hydraulics/place.ts'

/** How many of another unit one metre and one second are. */
export interface Units {
  length: number
  time: number
}

export const feetAndMinutes: Units = { length: 1 / 0.3048, time: 1 / 60 }

/** The factor that takes a quantity of a dimension into other units. */
export const factorOf = (dimension: Unknown['dimension'], { length, time }: Units): number =>
  ({
    transmissivity: length ** 2 / time,
    conductivity: length / time,
    length,
    time,
    dimensionless: 1,
  })[dimension]

export const rescaledParameters = (parameters: number[], unknowns: readonly Unknown[], units: Units): number[] =>
  parameters.map((value, k) => value * factorOf((unknowns[k] as Unknown).dimension, units))

const metres = (value: number | null, { length }: Units) => (value === null ? null : value * length)
const interval = (screen: Interval | null | undefined, { length }: Units): Interval | null =>
  screen ? { top_m: screen.top_m * length, bottom_m: screen.bottom_m * length } : null

/** A place whose lengths are counted in another unit. */
export const rescaledPlace = (place: ResponsePlace, units: Units): ResponsePlace => ({
  ...place,
  distance_m: place.distance_m * units.length,
  wellRadius_m: metres(place.wellRadius_m, units),
  casingRadius_m: metres(place.casingRadius_m, units),
  thickness_m: metres(place.thickness_m, units),
  pumpedScreen: interval(place.pumpedScreen, units),
  observedScreen: interval(place.observedScreen, units),
})

/** A whole test counted in other units, as if they were metres and seconds. */
export const rescaledInputs = (inputs: AnalysisInputs, units: Units): AnalysisInputs => ({
  ...inputs,
  rates: inputs.rates.map(({ start_s, rate_m3_s }) => ({
    start_s: start_s * units.time,
    rate_m3_s: (rate_m3_s * units.length ** 3) / units.time,
  })),
  thickness_m: metres(inputs.thickness_m, units),
  series: inputs.series.map((series) => ({
    ...series,
    distance_m: series.distance_m * units.length,
    distanceSd_m: series.distanceSd_m * units.length,
    wellRadius_m: metres(series.wellRadius_m, units),
    casingRadius_m: metres(series.casingRadius_m, units),
    screen: interval(series.screen, units),
    elapsed_s: series.elapsed_s.map((time) => time * units.time),
    drawdown_m: series.drawdown_m.map((drawdown) => drawdown * units.length),
  })),
})

export const rescaledBoundary = (boundary: ChosenBoundary, units: Units): ChosenBoundary => ({
  ...boundary,
  distance_m: metres(boundary.distance_m, units),
})

export const rescaledOptions = (options: AnalysisOptions, units: Units): AnalysisOptions => ({
  ...options,
  window: options.window && { from_s: options.window.from_s * units.time, to_s: options.window.to_s * units.time },
  boundaries: (options.boundaries ?? []).map((boundary) => rescaledBoundary(boundary, units)),
  time_s: options.time_s == null ? null : options.time_s * units.time,
})
