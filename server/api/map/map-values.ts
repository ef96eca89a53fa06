import type { MapWellQuery } from '#shared/contracts/map.ts'
import { atLeast, type Viewer } from '#shared/contracts/permissions.ts'
import type { Deps } from '../../deps.ts'
import type { createAdoptedValuesService } from '../adopted-values/adopted-values.service.ts'
import type { WellValue } from './map-cells.ts'
import { listValues } from './map.repository.ts'

export interface MapValuesNeeds {
  adoptedValues: Pick<ReturnType<typeof createAdoptedValuesService>, 'dataVersion'>
}

/** The newest value of each well by the id of the well. */
type Newest = ReadonlyMap<number, WellValue>

interface Kept {
  version: number
  values: Promise<Newest>
  size: number
}

/** Values that are kept for all people together, some 50 MB; those not asked for longest go first. */
const usuallyKept = 500_000

const newestOf = (oldestFirst: WellValue[]): Newest => new Map(oldestFirst.map((value) => [value.wellId, value]))

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
  const kept = new Map<string, Kept>()
  let size = 0

  function drop(key: string) {
    size -= kept.get(key)?.size ?? 0
    kept.delete(key)
  }

  function makeRoom() {
    for (const key of kept.keys()) {
      if (size <= mostKept) return
      drop(key)
    }
  }

  /** What was asked for last stands at the end. */
  function again(key: string, entry: Kept) {
    kept.set(key, entry)
    size += entry.size
    return entry.values
  }

  function keep(key: string, version: number, loading: Promise<Newest>) {
    const entry: Kept = { version, values: loading, size: 0 }
    kept.set(key, entry)
    loading.then(
      (values) => {
        if (kept.get(key) !== entry) return
        entry.size = values.size
        size += values.size
        makeRoom()
      },
      () => kept.get(key) === entry && drop(key),
    )
    return loading
  }

  return async (viewer: Viewer, { unitId, quantity, storageClass }: MapWellQuery): Promise<Newest> => {
    if (unitId === undefined) return new Map()
    // The version comes first: values that change meanwhile are then newer than it says, never older.
    const version = await adoptedValues.dataVersion(db, unitId)
    const key = [seenBy(viewer), unitId, quantity, storageClass].join(' ')
    const found = kept.get(key)
    drop(key)
    if (found?.version === version) return again(key, found)
    return keep(key, version, listValues(db, viewer, { unitId, quantity, storageClass }).then(newestOf))
  }
}
