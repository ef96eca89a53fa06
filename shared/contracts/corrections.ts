import { z } from 'zod'
import { instant, recordId, rowVersion } from './common.ts'
import { otherWell } from './other-wells.ts'
import { outsideSummary } from './outside-series.ts'

const MONTH_S = 31 * 86_400

/** How a level follows an outside series. */
export const efficiencySettings = z.discriminatedUnion('from', [
  z.object({
    from: z.literal('given'),
    value: z.number().min(-5).max(5),
    lagS: z.number().min(0).max(MONTH_S),
  }),
  z
    .object({
      from: z.literal('readings'),
      /** Longest lag tried, and the step between lags; a longest of 0 tries none. */
      longestLagS: z.number().min(0).max(MONTH_S),
      lagStepS: z.number().positive().max(MONTH_S),
    })
    .refine(({ longestLagS, lagStepS }) => longestLagS / lagStepS <= 400, {
      path: ['lagStepS'],
      message: 'correction/lags',
    }),
])
export type EfficiencySettings = z.infer<typeof efficiencySettings>

const following = <Kind extends string>(kind: Kind) =>
  z.object({ version: z.literal(1), kind: z.literal(kind), seriesId: recordId, efficiency: efficiencySettings })

/** What a correction is made with; figures that are not given are learned from the readings before pumping. */
export const correctionSettings = z.discriminatedUnion('kind', [
  z.object({
    version: z.literal(1),
    kind: z.literal('trend'),
    /** Rise of drawdown, m/s; null: learned. */
    slopeMPerS: z.number().min(-1).max(1).nullable(),
  }),
  z.object({ version: z.literal(1), kind: z.literal('tides') }),
  following('barometric'),
  following('gauge'),
  following('river'),
])
export type CorrectionSettings = z.infer<typeof correctionSettings>

const facts = {
  settings: correctionSettings,
  /** Wells of the test whose readings it corrects; null: all that have readings. */
  wellIds: z.array(recordId).min(1).max(60).nullable(),
  active: z.boolean().default(true),
}
export const correctionInput = z.object(facts)
export type CorrectionInput = z.input<typeof correctionInput>
export const correctionUpdate = z.object({ ...facts, rowVersion })
export type CorrectionUpdate = z.input<typeof correctionUpdate>

export const correction = z.object({
  id: recordId,
  ...facts,
  active: z.boolean(),
  /** Who set it as it is, and when. */
  by: z.string(),
  changedAt: instant,
  rowVersion,
})
export type CorrectionRecord = z.infer<typeof correction>

/** Everything about corrections of a test. */
export const testCorrections = z.object({
  corrections: z.array(correction),
  series: z.array(outsideSummary),
  otherWells: z.array(otherWell),
  mayEdit: z.boolean(),
})
export type TestCorrections = z.infer<typeof testCorrections>

export const correctionRemoval = z.object({ rowVersion: z.coerce.number().pipe(rowVersion) })
