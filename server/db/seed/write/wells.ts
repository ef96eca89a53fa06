import type { WellInput } from '#shared/contracts/wells.ts'
import type { Services } from '../../../api/services.ts'
import type { DemoRecords, DemoWell } from '../records/types.ts'
import type { UnitIds } from './geography.ts'
import type { Cast } from './people.ts'

const instant = (date: string | null) => (date === null ? null : new Date(date).toISOString())

function wellInput(well: DemoWell, verticalDatum: string, unitIds: UnitIds): WellInput {
  const { original, unit: _unit, lon: _lon, lat: _lat, embargoUntil: _embargo, screens, picks, ...facts } = well
  return {
    ...facts,
    ...original,
    verticalDatum,
    notes: null,
    confirmOutside: false,
    screens: screens.map(({ validFrom, validTo, ...depths }) => ({
      ...depths,
      validFrom: instant(validFrom),
      validTo: instant(validTo),
    })),
    picks: picks.map(({ unit, ...pick }) => ({ ...pick, unitId: unitIds.get(unit)! })),
  }
}

/** Enters one well as the steward does; an embargo is set afterwards, as for any published well. */
export async function writeWell(
  services: Services,
  { steward }: Cast,
  records: DemoRecords,
  well: DemoWell,
  unitIds: UnitIds,
): Promise<number> {
  const { id } = await services.wells.create(steward, wellInput(well, records.region.verticalDatum, unitIds))
  const embargoUntil = instant(well.embargoUntil)
  if (embargoUntil)
    await services.visibility.set(steward, 'well', id, { rowVersion: 1, visibility: well.visibility, embargoUntil })
  return id
}
