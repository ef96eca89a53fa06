import { differenceOfMeans, FEWEST_TO_COMPARE, type Difference } from '#shared/geostatistics/compare-means.ts'
import { normalScores } from '#shared/geostatistics/probability-plot.ts'
import { deviationOf, meanOf, robustScores } from '#shared/geostatistics/robust.ts'
import { trendOf, type Trend } from '#shared/geostatistics/trend.ts'
import { capacityPairs, type CapacityPairs, type CapacityTest } from './capacity-pairs.ts'
import { METHOD_GROUPS, type MethodGroup } from './method-group-ids.ts'
import { methodGroup } from './method-groups.ts'
import { prepareValues } from './prepared-values.ts'
import type { Evidence, Quantity, SiteValue, UnitModel, UsedValue } from './types.ts'
import { unitStatistics, type UnitStatistics } from './unit-statistics.ts'

/** A value of the statistics: one per well. Repeated tests are pooled; the surest of them lends id, method and year. */
export interface OverviewValue {
  id: string
  wellId: string
  label: string
  log10: number
  evidence: Evidence
  group: MethodGroup
  year: number | null
  /** Middle of the tested interval below ground; null where it is not known. */
  depth_m: number | null
  robustZ: number
  normalScore: number
  /** How many tests it was pooled from. */
  tests: number
}

export interface MethodComparison {
  group: MethodGroup
  n: number
  /** Mean of log10. */
  mean: number
  /** Difference of log10 from the values by curve fits; null where either are too few. */
  fromCurves: Difference | null
}

export interface UnitOverview {
  /** Null without values. */
  statistics: UnitStatistics | null
  values: OverviewValue[]
  methods: MethodComparison[]
  /** log10 on depth (m) and on the year. */
  depth: Trend | null
  year: Trend | null
  /** Values that the data rules leave out. */
  excluded: number
  /** Of transmissivity alone. */
  capacity: CapacityPairs | null
}

export interface OverviewRequest {
  values: readonly SiteValue[]
  quantity: Quantity
  /** Left out: values of any evidence. */
  evidence?: Evidence | undefined
  model: UnitModel | null
  capacityTests: readonly CapacityTest[]
}

/** Everything that the page of a unit's statistics says, from the values that its reader may see. */
export function unitOverview(request: OverviewRequest): UnitOverview {
  const { values, quantity, evidence, model, capacityTests } = request
  const asked = evidence ? values.filter((value) => value.evidence === evidence) : values
  const prepared = prepareValues(asked, quantity)
  const shown = overviewValues(prepared.used)
  return {
    statistics: unitStatistics(prepared, model),
    values: shown,
    methods: compareMethods(shown),
    depth: trendBy(shown, (value) => value.depth_m),
    year: trendBy(shown, (value) => value.year),
    excluded: prepared.excluded.length,
    capacity: quantity === 'T' ? capacityPairs(values, capacityTests) : null,
  }
}

function overviewValues(used: readonly UsedValue[]): OverviewValue[] {
  const logs = used.map((value) => value.log10)
  const scores = normalScores(logs)
  const robust = robustScores(logs)
  return used.map((value, i) => ({
    id: value.id,
    wellId: value.wellId,
    label: value.label,
    log10: value.log10,
    evidence: value.evidence,
    group: methodGroup(value),
    year: value.year,
    depth_m: middleOf(value),
    robustZ: robust[i]!,
    normalScore: scores[i]!,
    tests: value.testIds.length,
  }))
}

const middleOf = ({ screenTop_m: top, screenBottom_m: bottom }: UsedValue) =>
  top == null || bottom == null ? null : (top + bottom) / 2

function compareMethods(values: readonly OverviewValue[]): MethodComparison[] {
  const logsOf = (group: MethodGroup) => values.filter((value) => value.group === group).map(({ log10 }) => log10)
  const curves = logsOf('curve')
  return METHOD_GROUPS.map((group) => ({ group, logs: logsOf(group) }))
    .filter(({ logs }) => logs.length > 0)
    .map(({ group, logs }) => ({
      group,
      n: logs.length,
      mean: meanOf(logs),
      fromCurves: group !== 'curve' && comparable(logs, curves) ? differenceOfMeans(logs, curves) : null,
    }))
}

const comparable = (a: readonly number[], b: readonly number[]) =>
  Math.min(a.length, b.length) >= FEWEST_TO_COMPARE && deviationOf(a) + deviationOf(b) > 0

function trendBy(values: readonly OverviewValue[], of: (value: OverviewValue) => number | null): Trend | null {
  const points = values.flatMap((value) => {
    const x = of(value)
    return x === null ? [] : [{ x, y: value.log10 }]
  })
  return trendOf(points.map(({ x }) => x), points.map(({ y }) => y)) // prettier-ignore
}
