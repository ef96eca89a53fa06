import type { Dimension } from './units.ts'

/** A reader's choice of units: one unit id per dimension. */
export interface UnitSystem extends Record<Dimension, string> {
  id: string
  label: string
}

export const unitSystems: UnitSystem[] = [
  {
    id: 'metric',
    label: 'm²/d · L/s · m',
    length: 'm',
    time: 'min',
    discharge: 'L/s',
    transmissivity: 'm2/d',
    conductivity: 'm/d',
    specificCapacity: 'L/s/m',
    pressure: 'kPa',
    storage: '1',
  },
  {
    id: 'metric-daily',
    label: 'm²/d · m³/d · m',
    length: 'm',
    time: 'd',
    discharge: 'm3/d',
    transmissivity: 'm2/d',
    conductivity: 'm/d',
    specificCapacity: 'm3/d/m',
    pressure: 'kPa',
    storage: '1',
  },
  {
    id: 'metric-hourly',
    label: 'm²/d · m³/h · m',
    length: 'm',
    time: 'min',
    discharge: 'm3/h',
    transmissivity: 'm2/d',
    conductivity: 'm/d',
    specificCapacity: 'm3/h/m',
    pressure: 'kPa',
    storage: '1',
  },
  {
    id: 'si',
    label: 'm²/s · m³/s · m',
    length: 'm',
    time: 's',
    discharge: 'm3/s',
    transmissivity: 'm2/s',
    conductivity: 'm/s',
    specificCapacity: 'm3/s/m',
    pressure: 'Pa',
    storage: '1',
  },
  {
    id: 'us',
    label: 'ft²/d · US gpm · ft',
    length: 'ft',
    time: 'min',
    discharge: 'gpm-us',
    transmissivity: 'ft2/d',
    conductivity: 'ft/d',
    specificCapacity: 'gpm-us/ft',
    pressure: 'psi',
    storage: '1',
  },
  {
    id: 'us-gallons',
    label: 'US gpd/ft · US gpm · ft',
    length: 'ft',
    time: 'min',
    discharge: 'gpm-us',
    transmissivity: 'gpd-us/ft',
    conductivity: 'gpd-us/ft2',
    specificCapacity: 'gpm-us/ft',
    pressure: 'psi',
    storage: '1',
  },
  {
    id: 'imperial',
    label: 'imp gpd/ft · imp gpm · ft',
    length: 'ft',
    time: 'min',
    discharge: 'gpm-imp',
    transmissivity: 'gpd-imp/ft',
    conductivity: 'gpd-imp/ft2',
    specificCapacity: 'gpm-imp/ft',
    pressure: 'psi',
    storage: '1',
  },
]

export const defaultUnitSystemId = 'metric'

/** The system with this id, or the default one, so that a preference kept from an older version still shows numbers. */
export function unitSystemById(id: string): UnitSystem {
  const fallback = unitSystems.find((system) => system.id === defaultUnitSystemId)
  const system = unitSystems.find((candidate) => candidate.id === id) ?? fallback
  if (!system) throw new RangeError(`Unknown unit system: ${id}`)
  return system
}
