import type { OutsideMapping } from '#shared/contracts/outside-series.ts'
import { outsideRefusal } from '#shared/hydraulics/corrections/outside-check.ts'
import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatQuantity } from '#shared/quantities/format.ts'
import { unitById } from '#shared/quantities/units.ts'
import type { LogReading } from '#shared/readings/model.ts'
import { AppError } from '../../errors.ts'

interface Span {
  first: number
  last: number
}

/** What was taken of a series: its ends on the clock of the test, and its extremes in SI. */
export interface Extent {
  firstS: number
  lastS: number
  lowest: number
  highest: number
}

/** Thirty years either way, as rates may lie: what is farther was misread, and gaps between such times overflow. */
const FARTHEST_S = 1e9

/**
 * The extent of a series that can correct readings.
 * @throws AppError for one value, values that do not move or cannot be, and a series apart from the readings
 */
export function checkSeries(
  { summary }: LogReading,
  { value: { quantity, unit } }: OutsideMapping,
  readings: Span | null,
): Extent {
  const { taken, first_s, last_s, min_m, max_m } = summary
  if (taken < 2 || first_s === null || last_s === null || min_m === null || max_m === null)
    throw new AppError('correction/single-value', { found: taken })
  const extent = { firstS: first_s, lastS: last_s, lowest: min_m, highest: max_m }
  const refusal = outsideRefusal(quantity, extent)
  if (refusal) {
    const shown = (valueSI: number) => formatQuantity(valueSI, unit, { figures: 4, trim: true })
    const params = { swing: shown(max_m - min_m), highest: shown(max_m), unit: unitById(unit).label, found: taken }
    throw new AppError(`correction/${refusal}`, params)
  }
  checkNear(extent)
  checkOverlap(extent, readings)
  return extent
}

function checkNear({ firstS, lastS }: Extent): void {
  if (firstS >= -FARTHEST_S && lastS <= FARTHEST_S) return
  throw new AppError('correction/far-times', { from: formatElapsed(firstS), to: formatElapsed(lastS) })
}

function checkOverlap({ firstS, lastS }: Extent, readings: Span | null): void {
  if (!readings || (firstS < readings.last && lastS > readings.first)) return
  const [from, to, first, last] = [firstS, lastS, readings.first, readings.last].map(formatElapsed)
  throw new AppError('correction/no-overlap', { from: from!, to: to!, first: first!, last: last! })
}
