import type { UnitStatistics } from '#shared/contracts/unit-statistics.ts'
import type { UnitModel } from '#shared/estimates/types.ts'
import type { UnitOverview } from '#shared/estimates/unit-overview.ts'

interface Asked extends Pick<UnitStatistics, 'unit' | 'quantity'> {
  model: UnitModel
  outdated: boolean
}

export function unitStatisticsView({ unit, quantity, model, outdated }: Asked, overview: UnitOverview): UnitStatistics {
  const { statistics, values, methods, depth, year, excluded, capacity } = overview
  return {
    unit: { id: unit.id, code: unit.code, name: unit.name, kind: unit.kind },
    quantity,
    figures: statistics,
    values: values.map(({ id, wellId, label, depth_m: depthM, ...value }) => ({
      ...value,
      valueId: Number(id),
      wellId: Number(wellId),
      wellCode: label,
      depthM,
    })),
    outlierIds: statistics?.outlierIds.map(Number) ?? [],
    methods,
    depth,
    year,
    excluded,
    capacity: capacity && {
      ...capacity,
      pairs: capacity.pairs.map(({ wellId, label, ...pair }) => ({ ...pair, wellId: Number(wellId), wellCode: label })),
    },
    variogram: model.variogram,
    modelOutdated: outdated,
  }
}
