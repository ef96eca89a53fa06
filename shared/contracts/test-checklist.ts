import { z } from 'zod'

/** Conditions of a test that the trade asks for. Nothing is demanded: what nobody wrote down is `not-recorded`. */
const answer = <const Values extends readonly string[]>(values: Values) =>
  z.enum(['not-recorded', ...values]).default('not-recorded')

/** Stored with `version: 1`; a later shape brings its own literal and one upgrade from this one. */
export const testChecklist = z.object({
  version: z.literal(1),
  /** What the level did before the test; times and distances belong to the answer beside them. */
  staticTrend: answer(['not-watched', 'steady', 'falling', 'rising']),
  /** How long the level was watched before pumping. */
  trendWatchedS: z.number().positive().max(1e9).nullable().default(null),
  dischargeMeasured: answer(['container', 'meter', 'weir', 'orifice', 'estimated']),
  disposal: answer(['stream', 'drain', 'ground', 'tank', 'supply']),
  /** From the pumped well to where its water was let out. */
  disposalDistanceM: z.number().min(0).max(100_000).nullable().default(null),
  nearbyPumping: answer(['none', 'steady', 'changed']),
  rain: answer(['none', 'before', 'during']),
  barometer: answer(['not-watched', 'watched']),
  tide: answer(['no-effect', 'possible', 'watched']),
})
export type TestChecklist = z.infer<typeof testChecklist>

/** A checklist in which nothing is recorded. */
export const emptyChecklist = (): TestChecklist => testChecklist.parse({ version: 1 })

/** Whether anybody wrote anything down. */
export const isRecorded = ({ version: _, ...rest }: TestChecklist): boolean =>
  Object.values(rest).some((value) => value !== null && value !== 'not-recorded')
