import type { WellInput } from '#shared/contracts/wells.ts'
import type { PumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import type { AnalysisInputs, AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import type { MethodId } from '#shared/hydraulics/catalogue.ts'
import type { LogMapping } from '#shared/readings/model.ts'
import { aquiferUnits, region } from '../../server/db/schema/index.ts'
import type { Position } from '../../server/db/spatial.ts'
import type { SignedIn, TestApp } from './app.ts'

/** A square about a place, degrees. */
export const squareAround = ([lon, lat]: Position, half = 0.1): Position[][] => [
  [
    [lon - half, lat - half],
    [lon + half, lat - half],
    [lon + half, lat + half],
    [lon - half, lat + half],
    [lon - half, lat - half],
  ],
]

/** The invented island's middle. */
export const islandMiddle: Position = [-21.2, -38.4]

export async function makeRegion({ deps }: TestApp, overrides: Partial<typeof region.$inferInsert> = {}) {
  const row = {
    id: 1,
    name: 'Isle of Veldray',
    epsg: 32727,
    extent: [-21.5, -38.6, -20.9, -38.2] as [number, number, number, number],
    unitSystem: 'metric',
    zone: 'Etc/GMT+1',
    ...overrides,
  }
  await deps.connection.db.insert(region).values(row).onDuplicateKeyUpdate({ set: row })
}

export async function makeUnit(
  { deps }: TestApp,
  overrides: Partial<typeof aquiferUnits.$inferInsert> = {},
): Promise<number> {
  const [row] = await deps.connection.db
    .insert(aquiferUnits)
    .values({
      code: `U${Math.random().toString(36).slice(2, 8)}`,
      name: 'Fennick Limestone',
      kind: 'confined',
      depthOrder: 1,
      outline: squareAround(islandMiddle),
      ...overrides,
    })
    .$returningId()
  return row!.id
}

let wells = 0

export function makeWellInput(overrides: Partial<WellInput> = {}): WellInput {
  wells += 1
  return {
    code: `W-${wells}`,
    name: null,
    kind: 'well',
    x: islandMiddle[0],
    y: islandMiddle[1],
    epsg: 4326,
    positionAccuracyM: 3,
    groundElevationM: 34,
    measuringPointM: 0.4,
    verticalDatum: null,
    depthM: 60,
    wellRadiusM: 0.15,
    casingRadiusM: 0.125,
    staticDepthM: 5,
    drilledYear: 1998,
    ownerLabel: null,
    notes: null,
    visibility: 'internal',
    screens: [{ topM: 30, bottomM: 55, validFrom: null, validTo: null }],
    picks: [],
    confirmOutside: false,
    ...overrides,
  }
}

export async function createWell(person: SignedIn, overrides: Partial<WellInput> = {}): Promise<number> {
  const answer = await person.post('/api/wells').send(makeWellInput(overrides)).expect(201)
  return (answer.body as { id: number }).id
}

/** A well that readers see, entered by somebody who may publish it. */
export const createPublishedWell = (steward: SignedIn, overrides: Partial<WellInput> = {}): Promise<number> =>
  createWell(steward, { visibility: 'published', ...overrides })

/** Shows what somebody entered to readers. */
export async function publish(steward: SignedIn, resource: 'wells' | 'pumping-tests', id: number) {
  const { rowVersion } = (await steward.get(`/api/${resource}/${id}`).expect(200)).body as { rowVersion: number }
  const exposure = { rowVersion, visibility: 'published', embargoUntil: null }
  await steward.put(`/api/${resource}/${id}/visibility`).send(exposure).expect(200)
}

export const makeTestInput = (
  overrides: Partial<PumpingTestInput> & Pick<PumpingTestInput, 'wellId' | 'units'>,
): PumpingTestInput => ({
  startLocal: '2019-03-14T09:00',
  zone: 'Etc/GMT+1',
  aquifer: 'confined',
  intervalBasis: 'screens',
  intervalTopM: null,
  intervalBottomM: null,
  thicknessM: 20,
  thicknessBasis: 'aquifer',
  thicknessError: 0.1,
  rateError: 0.05,
  rateSteps: [{ startS: 0, rate: { value: 12, unit: 'L/s' } }],
  observationWells: [],
  staticLevelM: null,
  conditions: null,
  visibility: 'internal',
  ...overrides,
})

/** Time in the first column, the value in the second, one header line. */
export const makeMapping = (overrides: Partial<LogMapping> = {}): LogMapping => ({
  delimiter: ',',
  decimalMark: '.',
  firstDataRow: 2,
  time: { kind: 'elapsed', column: 0, unit: 'min', zero_s: 0 },
  value: { column: 1, quantity: 'drawdown', unit: 'm' },
  ...overrides,
})

export const upload = (
  person: SignedIn,
  testId: number,
  testWellId: number,
  text: string | Buffer,
  mapping: LogMapping,
) =>
  person
    .post(`/api/pumping-tests/${testId}/reading-series`)
    .field('request', JSON.stringify({ testWellId, mapping }))
    .attach('file', Buffer.from(text), 'log.csv')

interface Workbench {
  inputs: AnalysisInputs
  sha256: string
}

/** Calculates like the page does and saves; the answer of the server. */
export async function saveAnalysis(
  person: SignedIn,
  testId: number,
  method: MethodId,
  options: Partial<AnalysisOptions> = {},
) {
  const { inputs, sha256 } = (await person.get(`/api/pumping-tests/${testId}/inputs`).expect(200)).body as Workbench
  const chosen: AnalysisOptions = { wellIds: inputs.series.map(({ wellId }) => wellId), window: null, ...options }
  const result = analyse(method, inputs, chosen)
  const expected = { methodVersion: result.methodVersion, T: result.T?.value ?? null, S: result.S?.value ?? null }
  return person
    .post(`/api/pumping-tests/${testId}/analyses`)
    .send({ method, options: chosen, label: null, expected, inputsSha256: sha256 })
}
