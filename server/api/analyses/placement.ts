import { bearing } from '#shared/geodesy/index.ts'
import type { AnalysisInputs, Interval, Series } from '#shared/hydraulics/analysis.ts'
import type { TestWellRow } from '../pumping-tests/view.ts'

/** Screens open at the date of the test, and depths of units, of one well; metres below ground. */
export interface Construction {
  screens: { topM: number; bottomM: number }[]
  picks: { unitId: number; topM: number }[]
}

interface Site {
  aquifer: AnalysisInputs['aquifer']
  thicknessM: number | null
  /** Unit of the test, null for one of several units, whose screens lie in no single aquifer. */
  unitId: number | null
  pumped: TestWellRow | undefined
}

/** Where a well stands and where it is open, as the solutions see it. */
export function placement(
  well: TestWellRow,
  construction: Construction | undefined,
  { pumped, ...site }: Site,
): Required<Pick<Series, 'bearing_deg' | 'screen'>> {
  return {
    bearing_deg: pumped && pumped !== well ? bearing(lonLat(pumped), lonLat(well)) : null,
    screen: construction ? openPart(well, construction, site) : null,
  }
}

const lonLat = ({ position: [lon, lat] }: TestWellRow) => ({ lon, lat })

/** Open part below the aquifer's top; null where its depth is not known or the well is open elsewhere. */
function openPart(
  well: TestWellRow,
  { screens, picks }: Construction,
  { aquifer, thicknessM, unitId }: Omit<Site, 'pumped'>,
): Interval | null {
  const pick = picks.find((candidate) => candidate.unitId === unitId)
  if (!pick || screens.length === 0) return null
  const from = aquifer === 'unconfined' ? Math.max(pick.topM, waterTable(well) ?? pick.topM) : pick.topM
  const top_m = Math.max(0, Math.min(...screens.map(({ topM }) => topM)) - from)
  const bottom_m = Math.min(thicknessM ?? Infinity, Math.max(...screens.map(({ bottomM }) => bottomM)) - from)
  return bottom_m > top_m ? { top_m, bottom_m } : null
}

/** Depth of the water table below ground before the test. */
function waterTable({ staticDepthM, measuringPointM }: TestWellRow): number | null {
  return staticDepthM === null ? null : staticDepthM - (measuringPointM ?? 0)
}
