import { conductivities } from './conductivities.ts'
import { discharges } from './discharges.ts'
import { lengths } from './lengths.ts'
import { pressures } from './pressures.ts'
import { specificCapacities } from './specific-capacities.ts'
import { storages } from './storages.ts'
import { times } from './times.ts'
import { transmissivities } from './transmissivities.ts'
import type { Dimension, Unit } from './unit.ts'

export type { Dimension, Unit } from './unit.ts'

/** Every unit the program knows, by dimension; the first of each list is not special. */
const catalogue: Record<Dimension, Unit[]> = {
  length: lengths,
  time: times,
  discharge: discharges,
  transmissivity: transmissivities,
  conductivity: conductivities,
  specificCapacity: specificCapacities,
  pressure: pressures,
  storage: storages,
}

export const dimensions = Object.keys(catalogue) as Dimension[]

const byId = new Map(dimensions.flatMap((dimension) => catalogue[dimension].map((unit) => [unit.id, unit] as const)))

/** The units of one dimension, in the order a menu shows them. */
export function unitsOf(dimension: Dimension): Unit[] {
  return catalogue[dimension]
}

/** Whether `id` names a unit, of `dimension` when given. */
export function isUnitId(id: string, dimension?: Dimension): boolean {
  const unit = byId.get(id)
  return unit !== undefined && (dimension === undefined || unit.dimension === dimension)
}

/** The unit with this id. @throws RangeError when there is none: ids come from the catalogue, never from users' text. */
export function unitById(id: string): Unit {
  const unit = byId.get(id)
  if (!unit) throw new RangeError(`Unknown unit id: ${id}`)
  return unit
}

/** A value in the unit `unitId`, in SI. @throws RangeError for an unknown unit */
export function toSI(value: number, unitId: string): number {
  return value * unitById(unitId).toSI
}

/** An SI value in the unit `unitId`. @throws RangeError for an unknown unit */
export function fromSI(valueSI: number, unitId: string): number {
  return valueSI / unitById(unitId).toSI
}
