import type { Viewer } from '#shared/contracts/permissions.ts'
import { createServices, type Services } from '../../server/api/services.ts'
import type { Position } from '../../server/db/spatial.ts'
import type { TestApp } from './app.ts'
import { islandMiddle, makeWellInput } from './domain.ts'

export interface ReportedOverrides {
  code: string
  name: string | null
  at: Position
  units: { unitId: number; share: number; basis: 'single-unit' | 'flow-log' | 'judgement' }[]
  T: number
  S: number | null
  K: number | null
  storageClass: 'elastic' | 'specific-yield' | 'apparent' | 'unclassified' | null
  origin: 'slug-test' | 'specific-capacity' | 'legacy-reviewed' | 'legacy-number'
  observationWell: boolean
  startLocal: string
  zone: string
  source: string
  visibility: 'published' | 'internal'
  intervalTopM: number | null
  intervalBottomM: number | null
}

export interface Reported {
  wellId: number
  testId: number
  analysisId: number
}

/** Brings values into the regional table as stewards do with old reports: well, test, reported value, review. */
export interface Bookkeeping {
  services: Services
  steward: Viewer
  reviewer: Viewer
  /** Entered and submitted, not yet reviewed. */
  report(overrides: Partial<ReportedOverrides> & Pick<ReportedOverrides, 'units'>): Promise<Reported>
  /** Entered, submitted and accepted. */
  adopt(overrides: Partial<ReportedOverrides> & Pick<ReportedOverrides, 'units'>): Promise<Reported>
}

export const wholly = (unitId: number): ReportedOverrides['units'] => [{ unitId, share: 1, basis: 'single-unit' }]

export async function keepBooks(tested: TestApp): Promise<Bookkeeping> {
  const services = createServices(tested.deps)
  const person = async (mayReview: boolean): Promise<Viewer> => {
    const { id } = await tested.makePerson({ role: 'steward', mayReview })
    return { id, name: `Steward ${id}`, role: 'steward', mayReview }
  }
  const steward = await person(false)
  const reviewer = await person(true)

  const report: Bookkeeping['report'] = async (overrides) => {
    const { at: [x, y] = islandMiddle, code, name = null, visibility = 'published' } = overrides
    const { id: wellId } = await services.wells.create(
      steward,
      makeWellInput({ x, y, name, visibility, ...(code ? { code } : {}) }),
    )
    return { wellId, ...(await reportAt(services, steward, wellId, overrides)) }
  }

  return {
    services,
    steward,
    reviewer,
    report,
    async adopt(overrides) {
      const reported = await report(overrides)
      await accept(services, reviewer, reported.analysisId)
      return reported
    },
  }
}

/** A further value of a well that is there. */
export async function reportAt(
  services: Services,
  steward: Viewer,
  wellId: number,
  overrides: Partial<ReportedOverrides> & Pick<ReportedOverrides, 'units'>,
): Promise<{ testId: number; analysisId: number }> {
  const {
    units,
    startLocal = '1998-05-04',
    zone = 'Etc/GMT+1',
    source = 'Old report',
    visibility = 'published',
  } = overrides
  const { id: testId } = await services.pumpingTests.createReported(steward, {
    ...{ wellId, units, startLocal, zone, source, visibility },
    aquifer: 'confined',
    intervalBasis: 'unknown',
    intervalTopM: overrides.intervalTopM ?? null,
    intervalBottomM: overrides.intervalBottomM ?? null,
    thicknessM: 20,
    thicknessBasis: 'aquifer',
  })
  const { id: analysisId } = await services.analyses.report(steward, testId, {
    T: overrides.T ?? 1e-3,
    S: overrides.S ?? null,
    K: overrides.K ?? null,
    storageClass: overrides.storageClass ?? null,
    origin: overrides.origin ?? 'legacy-reviewed',
    observationWell: overrides.observationWell ?? true,
    aquifer: 'confined',
    source,
  })
  return { testId, analysisId }
}

export async function accept({ analyses, reviews }: Services, reviewer: Viewer, analysisId: number) {
  const { rowVersion } = await analyses.get(reviewer, analysisId)
  await reviews.decide(reviewer, analysisId, { rowVersion, decision: 'accepted', comment: null })
}
