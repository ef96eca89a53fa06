import type { MapWellQuery } from '#shared/contracts/map.ts'
import { atLeast, type Viewer } from '#shared/contracts/permissions.ts'
import { createCache } from '../../cache.ts'
import type { Deps } from '../../deps.ts'
import type { createAdoptedValuesService } from '../adopted-values/adopted-values.service.ts'
import type { WellValue } from './map-cells.ts'
import { listValues } from './map.repository.ts'

export interface MapValuesNeeds {
  adoptedValues: Pick<ReturnType<typeof createAdoptedValuesService>, 'dataVersion'>
}

/** The newest value of each well by the id of the well. */
type Newest = ReadonlyMap<number, WellValue>

const newestOf = (oldestFirst: WellValue[]): Newest => new Map(oldestFirst.map((value) => [value.wellId, value]))

/** Values that are kept for all people together, some 50 MB. */
const usuallyKept = 500_000

/** What a list costs beside its values, so that lists without any are not kept for ever. */
const listWeight = 100

/** Stewards see everything; everybody else may see something of their own. */
const seenBy = (viewer: Viewer) => (atLeast(viewer, 'steward') ? 'stewards' : `${viewer.role} ${viewer.id}`)

/**
 * The values of a unit at its wells, as a viewer may see them. A map is moved many times while they stay the same: they
 * are kept until the unit's data version moves, which every change of a value, a place or who may see it makes it do.
 */
export function createMapValues(
  { connection: { db } }: Deps,
  { adoptedValues }: MapValuesNeeds,
  mostKept = usuallyKept,
) {
  const keep = createCache<Newest>(mostKept, ({ size }) => size + listWeight)

  return async (viewer: Viewer, { unitId, quantity, storageClass }: MapWellQuery): Promise<Newest> => {
    if (unitId === undefined) return new Map()
    // The version comes first: values that change meanwhile are then newer than it says, never older.
    const version = await adoptedValues.dataVersion(db, unitId)
    const key = [seenBy(viewer), unitId, quantity, storageClass, version].join(' ')
    return keep(key, async () => newestOf(await listValues(db, viewer, { unitId, quantity, storageClass })))
  }
}
