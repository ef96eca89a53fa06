import { makeTestInput } from '../../support/domain.ts'
import type { SignedIn, TestApp } from '../../support/app.ts'
import { bumpDataVersions } from '../../../server/api/adopted-values/data-versions.repository.ts'
import { adoptedValues, analyses } from '../../../server/db/schema/index.ts'

type Row = typeof adoptedValues.$inferInsert

/**
 * An adopted value of a well with the test that it came from, straight into the tables: what the map shows of it is in
 * question here, not how it was found. SI.
 */
export async function makeAdoptedValue(
  { deps }: TestApp,
  steward: SignedIn,
  { wellId, unitId, value = 1e-3, ...rest }: Pick<Row, 'wellId' | 'unitId'> & { value?: number } & Partial<Row>,
): Promise<{ valueId: number; testId: number }> {
  const units = [{ unitId, share: 1, basis: 'single-unit' as const }]
  const test = await steward
    .post('/api/pumping-tests')
    .send(makeTestInput({ wellId, units, visibility: 'published' }))
    .expect(201)
  const pumpingTestId = (test.body as { id: number }).id
  const now = deps.now()
  const method = { method: 'theis', methodVersion: 1, state: 'accepted' as const }
  const snapshot = { inputsSha256: '0'.repeat(64), result: {}, createdAt: now }
  const [analysis] = await deps.connection.db
    .insert(analyses)
    .values({ pumpingTestId, ...method, ...snapshot })
    .$returningId()
  const row: Row = {
    pumpingTestId,
    analysisId: analysis!.id,
    wellId,
    unitId,
    quantity: 'T',
    log10Value: Math.log10(value),
    log10Error: 0.1,
    evidence: 'firm',
    method: 'theis',
    origin: 'observation-well',
    thicknessBasis: 'aquifer',
    testYear: 2019,
    validFrom: now,
    ...rest,
  }
  const [inserted] = await deps.connection.db.insert(adoptedValues).values(row).$returningId()
  await bumpDataVersions(deps.connection.db, [row.unitId])
  return { valueId: inserted!.id, testId: pumpingTestId }
}
