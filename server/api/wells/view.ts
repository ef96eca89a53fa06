import type { Well, WellSummary } from '#shared/contracts/wells.ts'
import type { listScreens } from './screens.repository.ts'
import type { listPicks, WellRow } from './wells.repository.ts'

type Rows<F extends (...args: never[]) => unknown> = Awaited<ReturnType<F>>

interface Parts extends Pick<Well, 'tests' | 'values' | 'mayEdit'> {
  screens: Rows<typeof listScreens>
  picks: Rows<typeof listPicks>
}

export function summaryView({ id, code, name, kind, position: [lon, lat], depthM, visibility }: WellRow): WellSummary {
  return { id, code, name, kind, lon, lat, depthM, visibility }
}

export function wellView(row: WellRow, { screens, picks, tests, values, mayEdit }: Parts): Well {
  return {
    ...row,
    ...summaryView(row),
    embargoUntil: row.embargoUntil?.toISOString() ?? null,
    screens: screens.map(({ topM, bottomM, validFrom, validTo }) => ({
      topM,
      bottomM,
      validFrom: validFrom?.toISOString() ?? null,
      validTo: validTo?.toISOString() ?? null,
    })),
    picks: picks.map(({ wellId: _, ...pick }) => pick),
    tests,
    values,
    mayEdit,
  }
}
