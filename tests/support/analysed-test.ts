import type { Analysis, WorkbenchInputs } from '#shared/contracts/analyses.ts'
import { analysisOptions } from '#shared/contracts/analysis-result.ts'
import type { PumpingTest, PumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import type { WellInput } from '#shared/contracts/wells.ts'
import { analyse, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { exponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import type { SignedIn } from './app.ts'
import { createWell, islandMiddle, makeMapping, makeTestInput, publish, saveAnalysis, upload } from './domain.ts'

interface Wanted {
  unitId: number
  pumped?: Partial<WellInput>
  observation?: Partial<WellInput>
  test?: Partial<PumpingTestInput>
}

const distanceM = 30

/** Drawdown every ten per cent of time for a day: Theis with T 0.005 m²/s, S 2e-4, 12 L/s; minutes and metres. */
export function theisLog(transmissivity = 0.005): string {
  const times = Array.from({ length: 60 }, (_, i) => 1.13 ** i)
  const drawdown = (minutes: number) =>
    (0.012 / (4 * Math.PI * transmissivity)) *
    exponentialIntegral((distanceM ** 2 * 2e-4) / (4 * transmissivity * minutes * 60))
  return ['minutes,drawdown', ...times.map((t) => `${t},${drawdown(t)}`)].join('\n')
}

export const inputOf = ({ unitId, test }: Wanted, pumped: number, observation: number): PumpingTestInput =>
  makeTestInput({
    wellId: pumped,
    units: [{ unitId, share: 1, basis: 'single-unit' }],
    observationWells: [{ wellId: observation, distanceBasis: 'measured', distanceM, reason: null, staticLevelM: null }],
    ...test,
  })

export const readTest = async (person: SignedIn, id: number): Promise<PumpingTest> =>
  (await person.get(`/api/pumping-tests/${id}`).expect(200)).body as PumpingTest

/** A test of two wells, with the readings of the one that is observed. */
export async function enterTest(person: SignedIn, wanted: Wanted) {
  const pumped = await createWell(person, wanted.pumped)
  const observation = await createWell(person, { x: islandMiddle[0] + 0.001, ...wanted.observation })
  const input = inputOf(wanted, pumped, observation)
  const { id } = (await person.post('/api/pumping-tests').send(input).expect(201)).body as { id: number }
  const test = await readTest(person, id)
  const { id: testWellId } = test.wells.find(({ role }) => role === 'observation')!
  await upload(person, id, testWellId, theisLog(), makeMapping()).expect(201)
  return { id, input, pumped, observation, test: await readTest(person, id) }
}

/** Shows a test with its pumped well to readers, and the observation well unless it is to stay hidden. */
export async function publishTest(
  steward: SignedIn,
  { id, pumped, observation }: Pick<Awaited<ReturnType<typeof enterTest>>, 'id' | 'pumped' | 'observation'>,
  { withObservation = true } = {},
) {
  await publish(steward, 'wells', pumped)
  if (withObservation) await publish(steward, 'wells', observation)
  await publish(steward, 'pumping-tests', id)
}

/** An analysis of the test, put forward for review. */
export async function submitAnalysis(person: SignedIn, testId: number): Promise<Analysis> {
  return submitDraft(person, (await saveAnalysis(person, testId, 'theis')).body as Analysis)
}

export async function submitDraft(person: SignedIn, { id, rowVersion }: Analysis): Promise<Analysis> {
  const submission = { rowVersion, rationale: 'The curve follows all readings.', confirmed: [] }
  return (await person.post(`/api/analyses/${id}/submission`).send(submission).expect(200)).body as Analysis
}

/** The draft once more, calculated from the inputs of its test as they are now. */
export async function recalculate(person: SignedIn, draft: Analysis): Promise<Analysis> {
  const { id, pumpingTestId, rowVersion } = draft
  const answer = await person.get(`/api/pumping-tests/${pumpingTestId}/inputs`).expect(200)
  const { inputs, sha256: inputsSha256 } = answer.body as WorkbenchInputs
  const method = draft.method as MethodId
  const options = analysisOptions.parse(draft.options)
  const { methodVersion, T, S } = analyse(method, inputs, options)
  const expected = { methodVersion, T: T?.value ?? null, S: S?.value ?? null }
  const update = { method, options, label: 'Calculated again', expected, inputsSha256, rowVersion }
  return (await person.put(`/api/analyses/${id}`).send(update).expect(200)).body as Analysis
}

export const accept = (reviewer: SignedIn, { id, rowVersion }: Analysis) =>
  reviewer.post(`/api/analyses/${id}/review`).send({ rowVersion, decision: 'accepted', comment: null })

export const readAnalysis = async (person: SignedIn, id: number): Promise<Analysis> =>
  (await person.get(`/api/analyses/${id}`).expect(200)).body as Analysis
