import { z } from 'zod'
import { unitsOf } from '../quantities/units.ts'
import { idInPath, instant, latitude, listOf, longitude, paging, recordId, rowVersion } from './common.ts'
import { testChecklist } from './test-checklist.ts'
import { checkKind, testDetails } from './test-details.ts'

export const testKind = z.enum(['constant-rate', 'step', 'slug', 'specific-capacity', 'reported'])
export const aquiferKind = z.enum(['confined', 'leaky', 'unconfined'])
export const thicknessBasis = z.enum(['aquifer', 'screen', 'saturated', 'unknown'])
export const intervalBasis = z.enum(['screens', 'packers', 'open-hole', 'unknown'])
export const shareBasis = z.enum(['single-unit', 'flow-log', 'judgement'])
export const distanceBasis = z.enum(['measured', 'map', 'override'])
export const visibility = z.enum(['published', 'internal', 'private'])
export const precision = z.enum(['instant', 'day', 'year'])

const isZone = (zone: string) => {
  try {
    new Intl.DateTimeFormat('en', { timeZone: zone })
    return true
  } catch {
    return false
  }
}

export const zone = z.string().max(60).refine(isZone, 'pumping-test/unknown-zone')
/** Level before pumping, m: a depth to water, negative in a flowing well, or a height, as the log has it. */
const staticLevel = z.number().min(-10_000).max(10_000).nullable()
const ids = (dimension: 'discharge') => z.enum(unitsOf(dimension).map(({ id }) => id) as [string, ...string[]])

/** The rate is kept as typed; the server converts it, so that a wrong unit can be seen and corrected later. */
export const rateStepInput = z.object({
  startS: z.number().min(-1e9).max(1e9),
  rate: z.object({ value: z.number().nonnegative('pumping-test/negative-rate').max(1e9), unit: ids('discharge') }),
})

export const observationWellInput = z
  .object({
    wellId: recordId,
    distanceBasis,
    /** Metres; not needed when the distance is taken from the map. */
    distanceM: z.number().positive('pumping-test/zero-distance').max(50_000).nullable(),
    /** Needed when a distance replaces the measured one or the map's. */
    reason: z.string().trim().max(300).nullable(),
    staticLevelM: staticLevel,
  })
  .superRefine((well, context) => {
    if (well.distanceBasis !== 'map' && well.distanceM === null) {
      context.addIssue({ code: 'custom', path: ['distanceM'], message: 'pumping-test/distance-needed' })
    }
    if (well.distanceBasis === 'override' && !well.reason) {
      context.addIssue({ code: 'custom', path: ['reason'], message: 'pumping-test/reason-needed' })
    }
  })

export const unitShareInput = z.object({ unitId: recordId, share: z.number().min(0.001).max(1), basis: shareBasis })

const rising = (steps: { startS: number }[]) => steps.every((step, i) => i === 0 || step.startS > steps[i - 1]!.startS)
const total = (units: { share: number }[]) => units.reduce((sum, { share }) => sum + share, 0)

const plainInput = z.object({
  wellId: recordId,
  /** Wall-clock time in `zone`; the day or the year alone where no more is known. */
  startLocal: z.string().regex(/^\d{4}(-\d{2}-\d{2}(T\d{2}:\d{2}(:\d{2})?)?)?$/, 'pumping-test/start-format'),
  zone,
  aquifer: aquiferKind,
  intervalBasis,
  /** Depths below ground, m; left empty with basis `screens`, which takes the screens valid at the date. */
  intervalTopM: z.number().min(0).max(5_000).nullable(),
  intervalBottomM: z.number().min(0).max(5_000).nullable(),
  units: z
    .array(unitShareInput)
    .min(1)
    .max(6)
    .refine((units) => Math.abs(total(units) - 1) < 1e-6, 'pumping-test/shares'),
  thicknessM: z.number().positive().max(2_000).nullable(),
  thicknessBasis,
  /** Relative standard deviation. */
  thicknessError: z.number().min(0).max(2).default(0.1),
  rateError: z.number().min(0).max(1).default(0.05),
  /** Pumping and its stop; none in a slug test. */
  rateSteps: z.array(rateStepInput).max(2_000).refine(rising, 'pumping-test/steps-order'),
  observationWells: z.array(observationWellInput).max(60),
  /** Depth to water in the pumped well before pumping, m. Null: the mean of the readings before pumping. */
  staticLevelM: staticLevel,
  /** Conditions that are asked for; left out or null: nothing was recorded. */
  checklist: testChecklist.nullable().optional(),
  /** Notes beside the checklist. */
  conditions: z.string().trim().max(5_000).nullable(),
  visibility: visibility.default('internal'),
  /** What a kind of its own needs; left out or null: a test at a constant rate. The kind of a test stays. */
  details: testDetails.nullable().optional(),
})

export const pumpingTestInput = plainInput.superRefine(checkKind)
export type PumpingTestInput = z.infer<typeof pumpingTestInput>

export const pumpingTestUpdate = plainInput.extend({ rowVersion }).superRefine(checkKind)
export type PumpingTestUpdate = z.infer<typeof pumpingTestUpdate>

const testWell = z.object({
  id: recordId,
  wellId: recordId,
  code: z.string(),
  role: z.enum(['pumped', 'observation']),
  lon: longitude,
  lat: latitude,
  distanceM: z.number(),
  distanceSdM: z.number(),
  distanceBasis,
  distanceReason: z.string().nullable(),
  staticLevelM: z.number().nullable(),
  staticBasis: z.enum(['given', 'mean-before-pumping']),
})
export type TestWell = z.infer<typeof testWell>

export const seriesSummary = z.object({
  id: recordId,
  testWellId: recordId,
  quantity: z.enum(['depth', 'level', 'drawdown']),
  fileName: z.string(),
  rowCount: z.int(),
  takenCount: z.int(),
  createdAt: instant,
  rowVersion,
})
export type SeriesSummary = z.infer<typeof seriesSummary>

export const pumpingTest = z.object({
  id: recordId,
  kind: testKind,
  wellId: recordId,
  wellCode: z.string(),
  startAt: instant,
  startLocal: z.string(),
  startPrecision: precision,
  zone: z.string(),
  aquifer: aquiferKind,
  intervalBasis,
  intervalTopM: z.number().nullable(),
  intervalBottomM: z.number().nullable(),
  units: z.array(unitShareInput.extend({ name: z.string() })),
  thicknessM: z.number().nullable(),
  thicknessBasis,
  thicknessError: z.number(),
  rateError: z.number(),
  rateSteps: z.array(
    z.object({ startS: z.number(), rateM3S: z.number(), enteredValue: z.number(), enteredUnit: z.string() }),
  ),
  wells: z.array(testWell),
  series: z.array(seriesSummary),
  details: testDetails.nullable(),
  checklist: testChecklist.nullable(),
  conditions: z.string().nullable(),
  source: z.string().nullable(),
  visibility,
  embargoUntil: instant.nullable(),
  createdBy: z.object({ id: recordId, name: z.string() }).nullable(),
  rowVersion,
  mayEdit: z.boolean(),
})
export type PumpingTest = z.infer<typeof pumpingTest>

const { id, kind, wellId, wellCode, startAt, startLocal, startPrecision } = pumpingTest.shape

export const pumpingTestSummary = z.object({
  ...{ id, kind, wellId, wellCode, startAt, startLocal, startPrecision },
  unitNames: z.array(z.string()),
  wellCount: z.int(),
  analysisCount: z.int(),
  state: z.enum(['no-readings', 'open', 'submitted', 'returned', 'accepted']),
  visibility,
})
export type PumpingTestSummary = z.infer<typeof pumpingTestSummary>

export const pumpingTestList = listOf(pumpingTestSummary)
export const pumpingTestQuery = paging.extend({
  text: z.string().trim().max(100).optional(),
  unitId: idInPath.optional(),
  wellId: idInPath.optional(),
  kind: testKind.optional(),
  state: pumpingTestSummary.shape.state.optional(),
  sort: z.enum(['-start', 'start', 'well']).default('-start'),
})
export type PumpingTestQuery = z.infer<typeof pumpingTestQuery>

export const created = z.object({ id: recordId })
