import { z } from 'zod'
import { instant, latitude, longitude, recordId, rowVersion } from './common.ts'
import { rateStepInput } from './pumping-tests.ts'

/** Where another pumping well stands: a well of the map, a typed position, or distance and direction. */
export const otherPlace = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('well'), wellId: recordId }),
  z.object({ kind: z.literal('position'), lon: longitude, lat: latitude }),
  z.object({
    kind: z.literal('distance'),
    /** From the pumped well, metres and degrees clockwise from north. */
    distanceM: z.number().positive('pumping-test/zero-distance').max(100_000),
    bearingDeg: z.number().min(0).max(360),
  }),
])
export type OtherPlace = z.infer<typeof otherPlace>

const rising = (steps: { startS: number }[]) => steps.every((step, i) => i === 0 || step.startS > steps[i - 1]!.startS)
const pumps = (steps: { rate: { value: number } }[]) => steps.some(({ rate }) => rate.value > 0)

const facts = {
  /** Null: the code of the well. */
  label: z.string().trim().min(1).max(40).nullable(),
  place: otherPlace,
  /** On the clock of the test; what it pumped before has negative times. */
  rateSteps: z
    .array(rateStepInput)
    .min(1)
    .max(500)
    .refine(rising, 'pumping-test/steps-order')
    .refine(pumps, 'pumping-test/no-pumping'),
  /** One factor on its rates is fitted; otherwise they are taken as they are. */
  fitted: z.boolean(),
  active: z.boolean().default(true),
}
interface Named {
  label: string | null
  place: OtherPlace
}
const isNamed = ({ label, place }: Named) => label !== null || place.kind === 'well'
const nameless = { path: ['label'], message: 'correction/other-well-name' }

export const otherWellInput = z.object(facts).refine(isNamed, nameless)
export type OtherWellInput = z.input<typeof otherWellInput>
export const otherWellUpdate = z.object({ ...facts, rowVersion }).refine(isNamed, nameless)
export type OtherWellUpdate = z.input<typeof otherWellUpdate>

export const otherWell = z.object({
  id: recordId,
  ...facts,
  label: z.string(),
  active: z.boolean(),
  distanceM: z.number(),
  bearingDeg: z.number(),
  by: z.string(),
  changedAt: instant,
  rowVersion,
})
export type OtherWellRecord = z.infer<typeof otherWell>

export const otherWellRemoval = z.object({ rowVersion: z.coerce.number().pipe(rowVersion) })
