import type { Services } from '../../../api/services.ts'
import type { DemoReportedTest, ReportBasis } from '../records/types.ts'
import type { UnitIds } from './geography.ts'
import type { Cast } from './people.ts'
import { publishTest } from './publish-test.ts'

const origins = {
  'specific-capacity': 'specific-capacity',
  'slug-test': 'slug-test',
  'checked-report': 'legacy-reviewed',
  'bare-number': 'legacy-number',
} as const satisfies Record<ReportBasis, string>

/** T as reported, or K times the thickness where a slug test gave K. */
function valuesOf({ values, thicknessM }: DemoReportedTest) {
  const of = (quantity: 'T' | 'S' | 'K') => values.find((value) => value.quantity === quantity)
  const K = of('K')?.value ?? null
  const T = of('T')?.value ?? K! * thicknessM
  return { T, K, S: of('S')?.value ?? null, storageClass: of('S')?.storageClass ?? null }
}

/**
 * Enters a test of which only values came down, as the steward does.
 * @returns what enters its value and has the reviewer accept it
 */
export async function enterReportedTest(
  services: Services,
  cast: Cast,
  test: DemoReportedTest,
  wellIds: Map<string, number>,
  unitIds: UnitIds,
): Promise<() => Promise<void>> {
  const { startLocal, zone, aquifer, thicknessM, thicknessBasis, source } = test
  const { id } = await services.pumpingTests.createReported(cast.steward, {
    ...{ startLocal, zone, aquifer, thicknessM, thicknessBasis, source },
    visibility: 'internal',
    wellId: wellIds.get(test.wellCode)!,
    intervalBasis: 'unknown',
    intervalTopM: null,
    intervalBottomM: null,
    units: [{ unitId: unitIds.get(test.unit)!, share: 1, basis: 'single-unit' }],
  })
  await publishTest(services, cast, { id, rowVersion: 1 }, test)
  const known = { origin: origins[test.basis], observationWell: false, aquifer, source }
  return async () => {
    const analysis = await services.analyses.report(cast.steward, id, { ...known, ...valuesOf(test) })
    await services.reviews.decide(cast.reviewer, analysis.id, {
      rowVersion: analysis.rowVersion,
      decision: 'accepted',
      comment: null,
    })
  }
}
