import { z } from 'zod'
import { recordId } from './common.ts'

/** What a kind of test needs beyond a pumping test at a constant rate. Stored with `version: 1`. */

const radius = z.number().positive().max(10)

export const slugRepeat = z.object({
  /** The log of this repeat. */
  seriesId: recordId,
  label: z.string().trim().max(60).nullable(),
  /** First displacement; null: the largest of the log. */
  initialM: z
    .number()
    .min(-200)
    .max(200)
    .refine((value) => value !== 0, 'pumping-test/zero-displacement')
    .nullable(),
  /** When the level was moved, on the clock of the test; null: the moment of the largest displacement. */
  startS: z.number().min(-1e9).max(1e9).nullable(),
})

export const slugDetails = z.object({
  version: z.literal(1),
  kind: z.literal('slug'),
  casingRadiusM: radius,
  wellRadiusM: radius,
  screenRadiusM: radius,
  screenLengthM: z.number().positive().max(2_000),
  /** Depth of the screen's top below the static level; negative when the level stands in the screen. */
  screenTopM: z.number().min(-2_000).max(5_000),
  filterPack: z.object({ radiusM: radius, porosity: z.number().positive().lt(1) }).nullable(),
  /** Relative standard deviation of the casing radius. */
  radiusError: z.number().min(0).max(1),
  /** Vertical over horizontal conductivity. */
  anisotropy: z.number().positive().max(100),
  /** Storativity assumed by the methods that need one, with the standard deviation of its log10. */
  storage: z.object({ value: z.number().positive().max(0.5), logSd: z.number().min(0).max(3) }),
  /** What is known of single repeats; a log without an entry is taken as it is. */
  repeats: z.array(slugRepeat).max(60).default([]),
})
export type SlugDetails = z.infer<typeof slugDetails>

export const stepDetails = z.object({ version: z.literal(1), kind: z.literal('step') })

export const specificCapacityDetails = z.object({
  version: z.literal(1),
  kind: z.literal('specific-capacity'),
  /** Drawdown in the pumped well when it was read, at the end of pumping, with its standard deviation. */
  drawdownM: z.number().positive().max(1_000),
  drawdownSdM: z.number().min(0).max(100),
  wellRadiusM: radius,
  casingRadiusM: radius.nullable(),
})

export const testDetails = z.discriminatedUnion('kind', [slugDetails, stepDetails, specificCapacityDetails])
export type TestDetails = z.infer<typeof testDetails>

interface Described {
  details?: TestDetails | null | undefined
  rateSteps: { rate: { value: number } }[]
  observationWells: unknown[]
  units: unknown[]
}

/** A negative rate has an error of its own. */
const pumping = ({ rateSteps }: Described) => rateSteps.some(({ rate }) => rate.value !== 0)

/** What each kind asks of the rest of the form: path and code of what is wrong. */
const demands: Record<
  TestDetails['kind'] | 'constant-rate',
  [path: string, code: string, holds: (test: Described) => boolean][]
> = {
  'constant-rate': [['rateSteps', 'pumping-test/no-pumping', pumping]],
  step: [
    ['rateSteps', 'pumping-test/no-pumping', pumping],
    ['observationWells', 'pumping-test/only-one-well', ({ observationWells }) => observationWells.length === 0],
  ],
  slug: [
    ['rateSteps', 'pumping-test/slug-rates', ({ rateSteps }) => rateSteps.length === 0],
    ['observationWells', 'pumping-test/only-one-well', ({ observationWells }) => observationWells.length === 0],
    ['units', 'pumping-test/single-unit', ({ units }) => units.length === 1],
  ],
  'specific-capacity': [
    ['rateSteps', 'pumping-test/no-pumping', pumping],
    [
      'rateSteps',
      'pumping-test/single-rate',
      ({ rateSteps }) => rateSteps.length === 2 && rateSteps[0]!.rate.value > 0 && rateSteps[1]!.rate.value === 0,
    ],
    ['observationWells', 'pumping-test/only-one-well', ({ observationWells }) => observationWells.length === 0],
  ],
}

/** The kind of a test, by its details. */
export const kindOf = ({ details }: Pick<Described, 'details'>) => details?.kind ?? 'constant-rate'

/** Adds what the kind of the test asks for and the rest of the form does not hold. */
export function checkKind(test: Described, context: z.RefinementCtx): void {
  const wrong = demands[kindOf(test)].find(([, , holds]) => !holds(test))
  if (wrong) context.addIssue({ code: 'custom', path: [wrong[0]], message: wrong[1] })
}
