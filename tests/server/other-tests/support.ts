import type { Analysis, KindWorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { PumpingTest, PumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import type { SlugDetails, TestDetails } from '#shared/contracts/test-details.ts'
import { analyseOwn, type OwnOptions } from '#shared/hydraulics/any-kind.ts'
import type { SignedIn } from '../../support/app.ts'
import { createWell, makeMapping, makeTestInput, upload } from '../../support/domain.ts'

export const makeSlugDetails = (overrides: Partial<SlugDetails> = {}): SlugDetails => ({
  version: 1,
  kind: 'slug',
  casingRadiusM: 0.05,
  wellRadiusM: 0.08,
  screenRadiusM: 0.05,
  screenLengthM: 3,
  screenTopM: 4,
  filterPack: null,
  radiusError: 0.02,
  anisotropy: 1,
  storage: { value: 1e-4, logSd: 1 },
  repeats: [],
  ...overrides,
})

export const readTest = async (person: SignedIn, id: number): Promise<PumpingTest> =>
  (await person.get(`/api/pumping-tests/${id}`).expect(200)).body as PumpingTest

interface Wanted {
  unitId: number
  details: TestDetails
  input?: Partial<PumpingTestInput>
  /** Logs in seconds and metres. */
  logs?: string[]
  quantity?: 'depth' | 'level' | 'drawdown'
  firstDataRow?: number
}

/** A test of a kind of its own in a new well, with its logs. */
export async function enterKind(person: SignedIn, wanted: Wanted) {
  const { unitId, details, input, logs = [], quantity = 'drawdown', firstDataRow = 2 } = wanted
  const wellId = await createWell(person)
  const body = makeTestInput({
    wellId,
    units: [{ unitId, share: 1, basis: 'single-unit' }],
    rateSteps: [],
    details,
    ...input,
  })
  const { id } = (await person.post('/api/pumping-tests').send(body).expect(201)).body as { id: number }
  const test = await readTest(person, id)
  const mapping = makeMapping({
    firstDataRow,
    time: { kind: 'elapsed', column: 0, unit: 's', zero_s: 0 },
    value: { column: 1, quantity, unit: 'm' },
  })
  for (const log of logs) await upload(person, id, test.wells[0]!.id, log, mapping).expect(201)
  return { id, wellId, input: body, test: await readTest(person, id) }
}

export const logOf = (rows: (readonly [number, number])[]): string =>
  ['seconds,metres', ...rows.map(([t, value]) => `${t},${value}`)].join('\n')

export const readKindInputs = async (person: SignedIn, testId: number): Promise<KindWorkbenchInputs> =>
  (await person.get(`/api/pumping-tests/${testId}/inputs`).expect(200)).body as KindWorkbenchInputs

/** The request that the page would send. */
export async function kindRequest(person: SignedIn, testId: number, method: string, options: OwnOptions) {
  const { kind, inputs, sha256: inputsSha256 } = await readKindInputs(person, testId)
  const { methodVersion, T, S, K, others = [] } = analyseOwn(kind, method, inputs, options)
  const expected = {
    methodVersion,
    T: T?.value ?? null,
    S: S?.value ?? null,
    K: K?.value ?? null,
    others: Object.fromEntries(others.map(({ id, value }) => [id, value])),
  }
  return { method, options, label: null, expected, inputsSha256 }
}

export async function saveKind(
  person: SignedIn,
  testId: number,
  method: string,
  options: OwnOptions,
): Promise<Analysis> {
  const body = await kindRequest(person, testId, method, options)
  return (await person.post(`/api/pumping-tests/${testId}/analyses`).send(body).expect(201)).body as Analysis
}
