import type { UnitFigures, UnitStatistics } from '#shared/contracts/unit-statistics.ts'
import { FEWEST_PAIRS } from '#shared/estimates/pair-limits.ts'
import type { MethodGroup } from '#shared/estimates/method-group-ids.ts'
import { formatNumber } from '#shared/quantities/format.ts'

export const methodGroupNames: Record<MethodGroup, string> = {
  curve: 'Curve fits',
  line: 'Straight lines',
  recovery: 'Recovery',
  steady: 'Steady state',
  slug: 'Slug tests',
  'specific-capacity': 'Specific capacity',
  step: 'Step tests',
  reported: 'Reported, method unknown',
}

const factor = (log10: number) => formatNumber(10 ** log10, { figures: 2 })

type Method = UnitStatistics['methods'][number]

/** What the ratio to the curve fits says. */
export function ratioText({ group, fromCurves }: Method): string {
  if (group === 'curve') return 'the measure'
  if (!fromCurves) return 'too few to compare'
  const { low, high } = fromCurves
  if (high < 0) return 'reads lower here'
  return low > 0 ? 'reads higher here' : 'no difference shown'
}

/** "0.10 (0.08 to 0.13)"; a dash where there is none. */
export const ratioFigures = ({ fromCurves }: Method): string =>
  fromCurves ? `${factor(fromCurves.difference)} (${factor(fromCurves.low)} to ${factor(fromCurves.high)})` : '–'

type Slope = NonNullable<UnitStatistics['depth']>

/** A trend as a factor over a span: of 10 m, of ten years. */
export function trendText(trend: Slope | null, { span, of, missing }: { span: number; of: string; missing: string }) {
  if (!trend) return missing
  const { slope, slopeLow, slopeHigh, n, explained } = trend
  const share = formatNumber(100 * explained, { figures: 2 })
  const interval = `× ${factor(slope * span)} for ${of} (95 % interval × ${factor(slopeLow * span)} to × ${factor(slopeHigh * span)}, if wells were independent)`
  const verdict = slopeLow <= 0 && slopeHigh >= 0 ? 'No trend is shown' : slope < 0 ? 'It falls' : 'It rises'
  return `${verdict}: ${interval}; ${n} wells, and ${share} % of the variance of log10 goes with it.`
}

/** How many pairs of specific capacity and T there are, and what they say. */
export function capacityText({ pairs, regression }: NonNullable<UnitStatistics['capacity']>): string {
  if (!regression) {
    const there =
      pairs.length === 0 ? 'no well has' : pairs.length === 1 ? 'one well has' : `${pairs.length} wells have`
    return `A line of the region's own needs ${FEWEST_PAIRS} pairs: ${there} both a specific-capacity test and a T from an observation well or a recovery.`
  }
  const { slope, slopeLow, slopeHigh, scatter, n } = regression
  const figures = [slope, slopeLow, slopeHigh].map((value) => formatNumber(value, { figures: 3 }))
  return `log10 T rises by ${figures[0]} (95 % interval ${figures[1]} to ${figures[2]}) for each factor of ten in specific capacity; ${n} pairs scatter about the line by a factor of ${factor(scatter)}.`
}

/** On what the interval of the mean rests. */
export function meanBasisText({ meanByKriging, sites }: Pick<UnitFigures, 'meanByKriging' | 'sites'>): string {
  if (!meanByKriging) return `counting ${sites} sites more than 500 m apart as independent`
  const worth = formatNumber(meanByKriging.effectiveN, { figures: 2 })
  return `by kriging of the mean with the unit's variogram: as sure as ${worth} independent wells`
}

export const statisticsCautions = {
  sample:
    'Wells are drilled where water is hoped for: these figures describe the wells that were tested, not the whole unit.',
  mean: 'The interval of the mean is no interval for a well: a new well may give anything between P10 and P90, or beyond.',
  outliers: 'An outlier is not a mistake: look at its test before anybody changes or withdraws it.',
  methods:
    'Methods were not used at the same wells: a ratio may come from where they were used. Intervals hold if wells were independent.',
  capacity:
    'Specific capacity is brought to one day with the T of the well, and is not corrected for well loss or partial penetration.',
} as const
