import type { PumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import { geodesicDistance } from '#shared/geodesy/index.ts'
import type { Position } from '../../db/spatial.ts'
import { fieldError } from '../../errors.ts'
import type { NewTestWell } from './pumping-tests.repository.ts'

export interface WellForTest {
  id: number
  code: string
  position: Position
  accuracyM: number
  depthM: number | null
}

/** Common practice: a distance between two wells on one site is taped to a decimetre. */
const tapeErrorM = 0.1

type Observation = PumpingTestInput['observationWells'][number]

/**
 * The pumped well and the observation wells as rows of the test, distances in metres.
 * A distance from the map carries the position accuracy of both wells.
 * @throws AppError on the well's field when it is unknown, repeated, or lies on the pumped well.
 */
export function testWellRows(input: PumpingTestInput, known: Map<number, WellForTest>): NewTestWell[] {
  const pumped = known.get(input.wellId)
  if (!pumped) throw fieldError('wellId', 'pumping-test/unknown-well')
  const seen = new Set([pumped.id])
  const observed = input.observationWells.map((observation, i) => {
    const well = known.get(observation.wellId)
    if (!well) throw fieldError(`observationWells.${i}.wellId`, 'pumping-test/unknown-well')
    if (seen.has(well.id))
      throw fieldError(`observationWells.${i}.wellId`, 'pumping-test/same-well', { code: well.code })
    seen.add(well.id)
    return {
      wellId: well.id,
      role: 'observation' as const,
      ...distance(observation, pumped, well, `observationWells.${i}.distanceM`),
      ...staticLevel(observation.staticLevelM),
    }
  })
  return [pumpedWellRow(pumped.id, input.staticLevelM), ...observed]
}

export const pumpedWellRow = (wellId: number, staticLevelM: number | null): NewTestWell => ({
  wellId,
  role: 'pumped',
  distanceM: 0,
  distanceSdM: 0,
  distanceBasis: 'measured',
  distanceReason: null,
  ...staticLevel(staticLevelM),
})

function distance(observation: Observation, pumped: WellForTest, well: WellForTest, path: string) {
  const { distanceBasis, distanceM, reason } = observation
  if (distanceBasis !== 'map') {
    return { distanceM: distanceM!, distanceSdM: tapeErrorM, distanceBasis, distanceReason: reason }
  }
  const onMap = geodesicDistance(
    { lon: pumped.position[0], lat: pumped.position[1] },
    { lon: well.position[0], lat: well.position[1] },
  )
  if (!(onMap > 0)) throw fieldError(path, 'pumping-test/same-place', { code: well.code })
  return {
    distanceM: onMap,
    distanceSdM: Math.hypot(pumped.accuracyM, well.accuracyM),
    distanceBasis,
    distanceReason: null,
  }
}

const staticLevel = (staticLevelM: number | null) => ({
  staticLevelM,
  staticBasis: staticLevelM === null ? ('mean-before-pumping' as const) : ('given' as const),
})
