import { readFileSync } from 'node:fs'
import { eq } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import type { AdoptedValueList } from '#shared/contracts/adopted-values.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import { adoptedValues } from '../../../server/db/schema/index.ts'
import { accept, publishTest, readAnalysis, submitDraft } from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion, makeUnit } from '../../support/domain.ts'
import { enterKind, kindRequest, logOf, makeSlugDetails, readKindInputs, saveKind } from './support.ts'

const tested = useApp()
let analyst: SignedIn
let reviewer: SignedIn
let steward: SignedIn
let reader: SignedIn
let unitId: number

beforeAll(async () => {
  await makeRegion(tested)
  unitId = await makeUnit(tested)
  analyst = await tested.signIn('analyst')
  reviewer = await tested.signIn('analyst', { mayReview: true })
  steward = await tested.signIn('steward')
  reader = await tested.signIn('reader')
})

const codeOf = ({ body }: { body: unknown }) => (body as Problem).code
const fieldsOf = ({ body }: { body: unknown }) =>
  Object.fromEntries((body as Problem).fields.map(({ path, code }) => [path, code]))

/**
 * The slug test near Dawsonville, Georgia, in a well with a radius of 7.6 cm, open for 98 m. Source: Cooper, Bredehoeft &
 * Papadopulos 1967, from memory. They found T 5.3 cm²/s and S about 1e-3 by type curve.
 */
const dawsonville = readFileSync(new URL('../../reference/dawsonville.csv', import.meta.url), 'utf8')
const openLength = 98
const dawsonvilleWell = () =>
  makeSlugDetails({
    casingRadiusM: 0.076,
    wellRadiusM: 0.076,
    screenRadiusM: 0.076,
    screenLengthM: openLength,
    screenTopM: 15,
  })
const published = () =>
  enterKind(analyst, {
    unitId,
    details: dawsonvilleWell(),
    input: { thicknessM: openLength, thicknessError: 0 },
    logs: [dawsonville],
    firstDataRow: 4,
  })
const all = { repeatIds: null }

/** A level that falls back by the same share in each second. */
const falling = (initial: number, seconds: number, start = 0): [number, number][] =>
  Array.from({ length: 120 }, (_, i) => [start + i, initial * Math.exp(-i / seconds)])

describe('a slug test', () => {
  it('gives from its file what was published for it, by the curve with storage', async () => {
    const { id } = await published()
    const { result } = await saveKind(analyst, id, 'cooper-bredehoeft-papadopulos', all)
    // By least squares over all readings; the type curve was laid by eye.
    expect(Math.abs(Math.log(result.T!.value / 5.3e-4))).toBeLessThan(0.2)
    expect(result.K!.value * openLength).toBeCloseTo(result.T!.value, 10)
    expect(result.S!.low).toBeLessThan(1e-3)
    expect(result.S!.high).toBeGreaterThan(1e-3)
  })

  it('takes its first displacement and its beginning from the log, and from the analyst where those are known', async () => {
    const { id, input, test } = await enterKind(analyst, {
      unitId,
      details: makeSlugDetails(),
      logs: [logOf(falling(0.4, 20)), logOf(falling(0.8, 20, 600))],
    })
    const before = await readKindInputs(analyst, id)
    if (before.kind !== 'slug') throw new Error('It is a slug test')
    expect(before.inputs.repeats.map(({ label, initial_m }) => [label, initial_m])).toEqual([
      ['Repeat 1', 0.4],
      ['Repeat 2', 0.8],
    ])
    expect(before.inputs.repeats[1]!.elapsed_s.slice(0, 2)).toEqual([0, 1])

    const { id: seriesId } = test.series[1]!
    const repeats = [{ seriesId, label: 'Large slug', initialM: 0.9, startS: 598 }]
    const changed = { ...input, details: makeSlugDetails({ repeats }), rowVersion: test.rowVersion }
    await analyst.put(`/api/pumping-tests/${id}`).send(changed).expect(200)
    const after = await readKindInputs(analyst, id)
    if (after.kind !== 'slug') throw new Error('It is a slug test')
    expect(after.inputs.repeats[1]).toMatchObject({ label: 'Large slug', initial_m: 0.9 })
    expect(after.inputs.repeats[1]!.elapsed_s[0]).toBe(2)
    expect(after.sha256).not.toBe(before.sha256)
  })

  it.each([
    ['depth', -1],
    ['level', 1],
  ] as const)('counts a %s to water from the static level, upwards positive', async (quantity, sign) => {
    const rows = falling(0.5, 20).map(([t, s]): [number, number] => [t, 6 + sign * s])
    const { id } = await enterKind(analyst, {
      unitId,
      details: makeSlugDetails(),
      input: { staticLevelM: 6 },
      logs: [logOf(rows)],
      quantity,
    })
    const { inputs } = await readKindInputs(analyst, id)
    expect('repeats' in inputs && inputs.repeats[0]!.initial_m).toBeCloseTo(0.5, 9)
  })

  it('says what is missing where there is no static level', async () => {
    const rows = falling(0.5, 20).map(([t, s]): [number, number] => [t + 1, 6 - s])
    const { id } = await enterKind(analyst, {
      unitId,
      details: makeSlugDetails(),
      logs: [logOf(rows)],
      quantity: 'depth',
    })
    expect((await readKindInputs(analyst, id)).problems.map(({ code }) => code)).toEqual(['readings/no-antecedent'])
  })

  it('is adopted as conductivity with slight evidence, its transmissivity derived and its storativity unused', async () => {
    const { id, wellId } = await published()
    const draft = await saveKind(analyst, id, 'cooper-bredehoeft-papadopulos', all)
    expect(draft.adoption).toMatchObject({ evidence: 'slight', storageUsable: false })
    await accept(reviewer, await submitDraft(analyst, draft)).expect(200)
    const { db } = tested.deps.connection
    const mine = await db.select().from(adoptedValues).where(eq(adoptedValues.wellId, wellId))
    expect(mine.map(({ quantity }) => quantity).sort()).toEqual(['K', 'S', 'T'])
    const of = (wanted: string) => mine.find(({ quantity }) => quantity === wanted)!
    expect(of('K')).toMatchObject({ origin: 'slug-test', evidence: 'slight', usable: true })
    expect(of('K').log10Error).toBeGreaterThanOrEqual(0.4)
    expect(of('T').log10Value - of('K').log10Value).toBeCloseTo(Math.log10(openLength), 9)
    expect(of('T').log10Error).toBeGreaterThanOrEqual(of('K').log10Error)
    expect(of('S').usable).toBe(false)
  })

  it('is adopted as conductivity alone where the thickness is not known', async () => {
    const { id } = await enterKind(analyst, {
      unitId,
      details: makeSlugDetails(),
      input: { thicknessM: null },
      logs: [logOf(falling(0.5, 20))],
    })
    const draft = await saveKind(analyst, id, 'hvorslev', all)
    expect(draft.result.T).toBeNull()
    expect(draft.adoption).toMatchObject({ evidence: 'slight', log10ErrorT: null })
    await accept(reviewer, await submitDraft(analyst, draft)).expect(200)
    const history = (await analyst.get(`/api/pumping-tests/${id}/adopted-values`).expect(200)).body as AdoptedValueList
    expect(history.items.map(({ quantity }) => quantity)).toEqual(['K'])
  })

  it('keeps only what the server finds too, and methods of its own kind', async () => {
    const { id } = await published()
    const request = await kindRequest(analyst, id, 'hvorslev', all)
    const send = (body: object) => analyst.post(`/api/pumping-tests/${id}/analyses`).send(body)
    const off = { ...request, expected: { ...request.expected, K: request.expected.K! * 1.00001 } }
    expect(codeOf(await send(off).expect(409))).toBe('analysis/result-differs')
    const theis = { ...request, method: 'theis', options: { wellIds: [], window: null } }
    expect(codeOf(await send(theis).expect(400))).toBe('analysis/wrong-kind')
    expect((await send({ ...request, options: { wellIds: [], window: null } })).status).toBe(400)
  })

  it('saves a request that was repeated once', async () => {
    const { id } = await published()
    const body = await kindRequest(analyst, id, 'hvorslev', all)
    const send = () => analyst.post(`/api/pumping-tests/${id}/analyses`).set('Idempotency-Key', `slug-${id}`).send(body)
    const [first, second] = [await send().expect(201), await send().expect(201)]
    expect((second.body as { id: number }).id).toBe((first.body as { id: number }).id)
  })

  it('marks its analyses when its construction changes', async () => {
    const { id, input, test } = await published()
    const draft = await saveKind(analyst, id, 'hvorslev', all)
    const details = { ...dawsonvilleWell(), casingRadiusM: 0.07 }
    await analyst
      .put(`/api/pumping-tests/${id}`)
      .send({ ...input, details, rowVersion: test.rowVersion })
      .expect(200)
    expect(await readAnalysis(analyst, draft.id)).toMatchObject({ inputsChanged: true })
  })

  it('is shown to readers once it is published and accepted, and not before', async () => {
    const { id, wellId } = await published()
    const draft = await saveKind(analyst, id, 'hvorslev', all)
    await reader.get(`/api/pumping-tests/${id}`).expect(404)
    await reader.get(`/api/pumping-tests/${id}/inputs`).expect(404)
    await accept(reviewer, await submitDraft(analyst, draft)).expect(200)
    await publishTest(steward, { id, pumped: wellId, observation: wellId }, { withObservation: false })
    expect(await readAnalysis(reader, draft.id)).toMatchObject({ method: 'hvorslev', state: 'accepted' })
    expect((await readKindInputs(reader, id)).kind).toBe('slug')
  })

  it('has no rates, no observation wells and one aquifer unit, and stays a slug test', async () => {
    const { id, input, test } = await published()
    const put = (change: object) =>
      analyst.put(`/api/pumping-tests/${id}`).send({ ...input, ...change, rowVersion: test.rowVersion })
    const rateSteps = [{ startS: 0, rate: { value: 1, unit: 'L/s' } }]
    expect(fieldsOf(await put({ rateSteps }).expect(400))).toEqual({ rateSteps: 'pumping-test/slug-rates' })
    const other = await makeUnit(tested)
    const units = [unitId, other].map((one) => ({ unitId: one, share: 0.5, basis: 'judgement' }))
    expect(fieldsOf(await put({ units }).expect(400))).toEqual({ units: 'pumping-test/single-unit' })
    expect(fieldsOf(await put({ details: null, rateSteps }).expect(400))).toEqual({ kind: 'pumping-test/kind-stays' })
    const list = (await analyst.get('/api/pumping-tests?kind=slug&limit=200').expect(200)).body as {
      items: { id: number }[]
    }
    expect(list.items.map((item) => item.id)).toContain(id)
  })
})
