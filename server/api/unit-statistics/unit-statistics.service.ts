import { specificCapacityDetails } from '#shared/contracts/test-details.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { UnitStatistics, UnitStatisticsQuery } from '#shared/contracts/unit-statistics.ts'
import type { CapacityTest } from '#shared/estimates/capacity-pairs.ts'
import type { UnitOverview } from '#shared/estimates/unit-overview.ts'
import { scopeOf } from '../../db/readable.ts'
import type { Deps } from '../../deps.ts'
import { notFound } from '../../errors.ts'
import type { UnitOverviewInput } from '../../jobs/tasks/unit-overview.ts'
import type { EstimatesService } from '../estimates/estimates.service.ts'
import * as repository from './unit-statistics.repository.ts'
import { unitStatisticsView } from './view.ts'

type CapacityRow = Awaited<ReturnType<typeof repository.listCapacityTests>>[number]

export interface UnitStatisticsNeeds {
  estimates: Pick<EstimatesService, 'unitValues'>
}

export function createUnitStatisticsService(deps: Deps, { estimates }: UnitStatisticsNeeds) {
  const { db } = deps.connection

  return {
    /** Statistics of a unit over the values that estimates for this viewer are made from. */
    async get(viewer: Viewer, unitId: number, { quantity, evidence }: UnitStatisticsQuery): Promise<UnitStatistics> {
      const found = await estimates.unitValues(viewer, unitId, quantity)
      if (!found) throw notFound()
      const tests = quantity === 'T' ? await repository.listCapacityTests(db, scopeOf(viewer), unitId) : []
      const { values, model, outdated, unit } = found
      const input: UnitOverviewInput = { values, quantity, evidence, model, capacityTests: tests.flatMap(capacityTest) }
      const overview = await deps.workers.run<UnitOverview>('unit-overview', input)
      return unitStatisticsView({ unit, quantity, model, outdated }, overview)
    },
  }
}

/** Pumped once at one rate; the drawdown is that of the end of pumping. */
function capacityTest({ wellId, details, rates: [pumping, stop] }: CapacityRow): CapacityTest[] {
  if (!pumping || !stop) return []
  const { drawdownM } = specificCapacityDetails.parse(details)
  return [
    {
      wellId: String(wellId),
      rate_m3_s: pumping.rateM3S,
      drawdown_m: drawdownM,
      duration_s: stop.startS - pumping.startS,
    },
  ]
}
