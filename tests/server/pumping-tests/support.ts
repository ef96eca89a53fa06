import type { Analysis } from '#shared/contracts/analyses.ts'
import type { PumpingTest, PumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import type { SignedIn, TestApp } from '../../support/app.ts'
import { createWell, islandMiddle, makeMapping, makeTestInput, makeUnit, upload } from '../../support/domain.ts'

export interface Site {
  unitId: number
  pumped: number
  observation: number
}

/** A pumped well and an observation well 90 m east of it, in a unit of their own. */
export async function makeSite(tested: TestApp, person: SignedIn): Promise<Site> {
  const unitId = await makeUnit(tested)
  const pumped = await createWell(person)
  const observation = await createWell(person, { x: islandMiddle[0] + 0.001, kind: 'piezometer' })
  return { unitId, pumped, observation }
}

export const siteInput = ({ unitId, pumped, observation }: Site, overrides: Partial<PumpingTestInput> = {}) =>
  makeTestInput({
    wellId: pumped,
    units: [{ unitId, share: 1, basis: 'single-unit' }],
    observationWells: [
      { wellId: observation, distanceBasis: 'measured', distanceM: 90, reason: null, staticLevelM: null },
    ],
    ...overrides,
  })

export async function createTest(person: SignedIn, input: PumpingTestInput): Promise<PumpingTest> {
  const { id } = (await person.post('/api/pumping-tests').send(input).expect(201)).body as { id: number }
  return (await person.get(`/api/pumping-tests/${id}`).expect(200)).body as PumpingTest
}

/** Drawdown of a confined aquifer (straight-line part) at 30 times, as a file: T 0.005 m²/s, S 2e-4, 12 L/s at 90 m. */
export function makeLog(): string {
  const rows = Array.from({ length: 30 }, (_, i) => {
    const minutes = 10 * 1.25 ** i
    const u = (90 * 90 * 2e-4) / (4 * 0.005 * minutes * 60)
    const drawdown = (0.012 / (4 * Math.PI * 0.005)) * (-0.5772156649 - Math.log(u) + u)
    return `${minutes.toFixed(3)},${drawdown.toFixed(4)}`
  })
  return ['time (min),drawdown (m)', ...rows].join('\n')
}

export async function testWithReadings(
  person: SignedIn,
  input: PumpingTestInput,
  log = makeLog(),
): Promise<PumpingTest> {
  const test = await createTest(person, input)
  const well = test.wells.find(({ role }) => role === 'observation')!
  await upload(person, test.id, well.id, log, makeMapping()).expect(201)
  return (await person.get(`/api/pumping-tests/${test.id}`).expect(200)).body as PumpingTest
}

/** Paths and codes of a refused form. */
export const fieldsOf = (body: unknown) =>
  Object.fromEntries((body as Problem).fields.map(({ path, code }) => [path, code]))

export const submit = (person: SignedIn, { id, rowVersion }: Analysis, confirmed: string[] = []) =>
  person.post(`/api/analyses/${id}/submission`).send({ rowVersion, rationale: 'It fits.', confirmed })

export const decide = (
  person: SignedIn,
  { id, rowVersion }: Analysis,
  decision: 'accepted' | 'returned',
  comment: string | null = null,
) => person.post(`/api/analyses/${id}/review`).send({ rowVersion, decision, comment })
