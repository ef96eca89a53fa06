import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { TestCorrections, CorrectionInput, CorrectionRecord } from '#shared/contracts/corrections.ts'
import type { OutsideInput, OutsideSummary } from '#shared/contracts/outside-series.ts'
import type { WorkbenchInputs } from '#shared/contracts/analyses.ts'
import { theisDrawdown } from '#shared/hydraulics/theis.ts'
import { inputOf, readTest } from '../../support/analysed-test.ts'
import type { SignedIn } from '../../support/app.ts'
import { createWell, islandMiddle, makeMapping, upload } from '../../support/domain.ts'

export const [T, S, efficiency] = [0.005, 2e-4, 0.4]
const distanceM = 30

/** Air pressure as metres of water at a time in minutes: weather, and a wave of twelve hours. */
const pressureM = (minutes: number) =>
  10.2 + 0.15 * Math.sin(minutes / 900) + 0.03 * Math.cos((minutes * 2 * Math.PI) / 720)

/** Depth to water: five days before pumping, one day of it, moved by air pressure. */
export function levelLog(): string {
  const before = Array.from({ length: 240 }, (_, i) => -7200 + 30 * i)
  const during = Array.from({ length: 60 }, (_, i) => 1.13 ** i)
  const depth = (minutes: number) =>
    7 + efficiency * pressureM(minutes) + (minutes > 0 ? theisDrawdown(0.012, T, S, distanceM, minutes * 60) : 0)
  return ['minutes,depth', ...[...before, ...during].map((t) => `${t},${depth(t)}`)].join('\n')
}

/** Air pressure in hPa every ten minutes, over the readings and a day more at either end. */
export function pressureLog(from = -8640, to = 2880, value = pressureM): string {
  const times = Array.from({ length: (to - from) / 10 + 1 }, (_, i) => from + 10 * i)
  return ['minutes,pressure', ...times.map((t) => `${t},${value(t) * 98.0665}`)].join('\n')
}

export const pressureMapping = (unit = 'hPa') => ({
  ...makeMapping(),
  value: { column: 1, quantity: 'air-pressure' as const, unit },
})

/** A test whose observation well follows the weather. */
export async function enterWeatherTest(person: SignedIn, unitId: number, log = levelLog()) {
  const pumped = await createWell(person)
  const observation = await createWell(person, { x: islandMiddle[0] + 0.001 })
  const input = inputOf({ unitId }, pumped, observation)
  const { id } = (await person.post('/api/pumping-tests').send(input).expect(201)).body as { id: number }
  const test = await readTest(person, id)
  const { id: testWellId } = test.wells.find(({ role }) => role === 'observation')!
  const mapping = makeMapping({ value: { column: 1, quantity: 'depth', unit: 'm' } })
  await upload(person, id, testWellId, log, mapping).expect(201)
  return { id, pumped, observation, test: (await readTest(person, id)) as PumpingTest }
}

export const uploadOutside = (person: SignedIn, testId: number, text: string, request: Partial<OutsideInput> = {}) =>
  person
    .post(`/api/pumping-tests/${testId}/outside-series`)
    .field('request', JSON.stringify({ label: 'Barometer', mapping: pressureMapping(), ...request }))
    .attach('file', Buffer.from(text), 'baro.csv')

export const uploadPressure = async (person: SignedIn, testId: number): Promise<OutsideSummary> =>
  ((await uploadOutside(person, testId, pressureLog()).expect(201)).body as { series: OutsideSummary }).series

export const barometric = (seriesId: number): CorrectionInput => ({
  settings: {
    version: 1,
    kind: 'barometric',
    seriesId,
    efficiency: { from: 'readings', longestLagS: 0, lagStepS: 3600 },
  },
  wellIds: null,
})

export const correct = (person: SignedIn, testId: number, wanted: CorrectionInput) =>
  person.post(`/api/pumping-tests/${testId}/corrections`).send(wanted)

export const switchTo = (person: SignedIn, { id, settings, wellIds, rowVersion }: CorrectionRecord, active: boolean) =>
  person.put(`/api/corrections/${id}`).send({ settings, wellIds, active, rowVersion })

export const inputsOf = async (person: SignedIn, testId: number): Promise<WorkbenchInputs> =>
  (await person.get(`/api/pumping-tests/${testId}/inputs`).expect(200)).body as WorkbenchInputs

export const correctionsOf = async (person: SignedIn, testId: number): Promise<TestCorrections> =>
  (await person.get(`/api/pumping-tests/${testId}/corrections`).expect(200)).body as TestCorrections
