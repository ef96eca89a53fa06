import type { Estimate, EstimateQuantity, EstimateQuery, NearbyQuery } from '#shared/contracts/estimates.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { estimateFrom } from '#shared/estimates/estimate-at.ts'
import type { EstimateContext } from '#shared/estimates/types.ts'
import { distanceToLines } from '#shared/geostatistics/planar.ts'
import { scopeOf, type Scope } from '../../db/readable.ts'
import type { Position } from '../../db/spatial.ts'
import type { Deps } from '../../deps.ts'
import { AppError } from '../../errors.ts'
import type { createAdoptedValuesService } from '../adopted-values/adopted-values.service.ts'
import type { RegionService } from '../region/region.service.ts'
import type { createStreamsService } from '../streams/streams.service.ts'
import * as repository from './estimates.repository.ts'
import { createModels } from './models.ts'
import { nearbyTests } from './nearby.ts'
import { projector } from './unit-data.ts'
import { estimateView } from './view.ts'

export interface EstimatesNeeds {
  region: Pick<RegionService, 'get'>
  streams: Pick<ReturnType<typeof createStreamsService>, 'connected'>
  adoptedValues: Pick<ReturnType<typeof createAdoptedValuesService>, 'dataVersion'>
}

export function createEstimatesService(deps: Deps, { region, streams, adoptedValues }: EstimatesNeeds) {
  const { db } = deps.connection
  const models = createModels(deps, adoptedValues)

  async function chooseUnit(place: Position, unitId: number | undefined) {
    const units = await repository.unitsAt(db, place)
    if (unitId === undefined) return { units, unit: units.find(({ kind }) => kind !== 'aquitard') ?? null }
    const unit = units.find(({ id }) => id === unitId) ?? (await repository.findUnit(db, unitId))
    if (!unit) throw new AppError('estimate/unknown-unit')
    return { units, unit }
  }

  return {
    refit: models.refit,

    /** What to expect at a place, from the values the viewer may see. */
    async estimate(viewer: Viewer, query: EstimateQuery): Promise<Estimate> {
      const place: Position = [query.lon, query.lat]
      const { epsg } = await region.get()
      const point = projector(epsg)(place)
      const { units, unit } = await chooseUnit(place, query.unitId)
      const shown = { place, point, epsg, units, unit, quantity: query.quantity }
      if (!unit) return estimateView(shown, null)

      const scope: Scope = scopeOf(viewer)
      const { data, model, dataVersion, outdated } = await models.current(unit.id, query.quantity, scope, epsg)
      const near = await streams.connected(db, [unit.id], place)
      const context: EstimateContext = {
        unit: data.unit,
        quantity: query.quantity,
        barriers: data.barriers,
        streams: near.map(({ name, distanceM }) => ({ name, distance_m: distanceM })),
        coastDistance_m: data.coasts.length === 0 ? null : distanceToLines(point, data.coasts),
        depth_m: query.depthM ?? null,
        yearNow: deps.now().getUTCFullYear(),
        modelOutdated: outdated,
      }
      const result = estimateFrom(point, data.values, model, context)
      return estimateView(shown, { result, model, data, dataVersion, outdated, stream: near[0] ?? null })
    },

    /** The values of a unit that estimates for the viewer are made from, with their model; null: there is no such unit. */
    async unitValues(viewer: Viewer, unitId: number, quantity: EstimateQuantity) {
      const unit = await repository.findUnit(db, unitId)
      if (!unit) return null
      const { epsg } = await region.get()
      const { data, model, outdated } = await models.current(unitId, quantity, scopeOf(viewer), epsg)
      return { unit, values: data.siteValues, model, outdated }
    },

    /** Tests within a radius that the viewer may see, nearest first, with their current values. */
    nearby: (viewer: Viewer, query: NearbyQuery) => nearbyTests(db, viewer, query),
  }
}

export type EstimatesService = ReturnType<typeof createEstimatesService>
