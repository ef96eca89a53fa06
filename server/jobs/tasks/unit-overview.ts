import { unitOverview, type OverviewRequest, type UnitOverview } from '#shared/estimates/unit-overview.ts'

export type UnitOverviewInput = OverviewRequest

/** Away from the main thread: a mean by generalised least squares of hundreds of values takes a tenth of a second. */
export const unitOverviewTask = (input: UnitOverviewInput): UnitOverview => unitOverview(input)
