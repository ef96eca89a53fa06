import type { AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import { unitById } from '#shared/quantities/units.ts'
import type { XY } from './plot-wells.ts'
import type { TimePlot } from './time-plot.ts'

/** A reading with its place on a plot, whether or not it is drawn there. */
export interface PlacedReading {
  wellId: string
  /** Of the reading in its series. */
  index: number
  x: number
  y: number
  elapsed_s: number
  included: boolean
}

/** Every reading of the wells of a plot that has a place on it. */
export function placedReadings({ wells, clock, units, x: axis, y: upright }: TimePlot, inputs: AnalysisInputs) {
  const length_m = unitById(units.length).toSI
  const shown = inputs.series.filter(({ wellId }) => wells.some((well) => well.wellId === wellId))
  return shown.flatMap(({ wellId, elapsed_s, drawdown_m, included }) =>
    elapsed_s.flatMap((elapsed, index): PlacedReading[] => {
      const x = clock.place(elapsed)
      const y = (drawdown_m[index] as number) / length_m
      const isShown = x !== null && x >= axis.min && x <= axis.max && (upright.scale === 'linear' || y > 0)
      return isShown ? [{ wellId, index, x, y, elapsed_s: elapsed, included: included[index] as boolean }] : []
    }),
  )
}

/** Whether a point lies inside a closed outline, by the even-odd rule; on its edge it may fall to either side. */
export function isInside([x, y]: XY, outline: readonly XY[]): boolean {
  let inside = false
  outline.forEach(([x1, y1], i) => {
    const [x2, y2] = outline.at(i - 1) as XY
    if (y1 > y !== y2 > y && x < x1 + ((y - y1) / (y2 - y1)) * (x2 - x1)) inside = !inside
  })
  return inside
}

/** The point nearest to another and no farther than `within`; null when there is none. */
export function nearestTo<Item>(
  at: XY,
  items: readonly Item[],
  place: (item: Item) => XY,
  within: number,
): Item | null {
  let best: Item | null = null
  let least = within
  for (const item of items) {
    const [x, y] = place(item)
    const away = Math.hypot(x - at[0], y - at[1])
    if (away > least) continue
    best = item
    least = away
  }
  return best
}
