import { z } from 'zod'
import { otherPlace, otherWellInput, type OtherWellRecord } from '#shared/contracts/other-wells.ts'
import { bearing, destination, geodesicDistance, type LonLat } from '#shared/geodesy/index.ts'
import type { OtherWell } from '#shared/hydraulics/analysis.ts'
import { toSI } from '#shared/quantities/units.ts'
import type { TestWellRow } from '../pumping-tests/view.ts'
import type { FoundOtherWell } from './other-wells.repository.ts'

const storedSteps = z.array(otherWellInput.shape.rateSteps.element)

const lonLat = ([lon, lat]: [number, number]): LonLat => ({ lon, lat })

/** Where it stands, as seen from the pumped well; null where the viewer may not know. */
export function siteOf({ row, position }: Pick<FoundOtherWell, 'row' | 'position'>, pumped: TestWellRow) {
  const place = otherPlace.parse(row.place)
  const from = lonLat(pumped.position)
  if (place.kind === 'distance') {
    const { distanceM, bearingDeg } = place
    return { at: destination(from, bearingDeg, distanceM), distanceM, bearingDeg }
  }
  if (place.kind === 'well' && !position) return null
  const at = place.kind === 'well' ? lonLat(position!) : { lon: place.lon, lat: place.lat }
  return { at, distanceM: geodesicDistance(from, at), bearingDeg: bearing(from, at) }
}

export const pumpedOf = (wells: TestWellRow[]): TestWellRow => {
  const pumped = wells.find(({ row }) => row.role === 'pumped')
  if (!pumped) throw new Error('A test has a pumped well')
  return pumped
}

/** Nothing of a well that the viewer may not see. */
export function viewOf(found: FoundOtherWell, wells: TestWellRow[]): OtherWellRecord[] {
  const site = siteOf(found, pumpedOf(wells))
  if (!site) return []
  const { row, by } = found
  return [
    {
      id: row.id,
      label: row.label,
      place: otherPlace.parse(row.place),
      rateSteps: storedSteps.parse(row.rateSteps),
      fitted: row.fitted,
      active: row.active,
      distanceM: site.distanceM,
      bearingDeg: site.bearingDeg,
      by: by ?? '',
      changedAt: row.changedAt.toISOString(),
      rowVersion: row.rowVersion,
    },
  ]
}

/** The same as analyses superpose it. Distances between wells of the map are geodesic. */
export function inputOf(found: FoundOtherWell, wells: TestWellRow[]): OtherWell[] {
  const site = siteOf(found, pumpedOf(wells))
  if (!site || !found.row.active) return []
  const { row } = found
  return [
    {
      wellId: row.wellId === null ? null : String(row.wellId),
      label: row.label,
      rates: storedSteps
        .parse(row.rateSteps)
        .map(({ startS, rate }) => ({ start_s: startS, rate_m3_s: toSI(rate.value, rate.unit) })),
      fitted: row.fitted,
      distance_m: site.distanceM,
      bearing_deg: site.bearingDeg,
      distances: wells.map((well) => ({
        wellId: String(well.row.wellId),
        distance_m: well.row.role === 'pumped' ? site.distanceM : geodesicDistance(lonLat(well.position), site.at),
      })),
    },
  ]
}
