import { beforeAll, describe, expect, it } from 'vitest'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { CorrectionRecord } from '#shared/contracts/corrections.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import type { Well } from '#shared/contracts/wells.ts'
import type { OutsideRow } from '#shared/contracts/outside-series.ts'
import { accept, inputOf, publishTest, readAnalysis, submitDraft } from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion, makeUnit, saveAnalysis } from '../../support/domain.ts'
import { enterKind, makeSlugDetails } from '../other-tests/support.ts'
import {
  barometric,
  correct,
  correctionsOf,
  efficiency,
  enterWeatherTest,
  inputsOf,
  levelLog,
  pressureLog,
  pressureMapping,
  switchTo,
  T,
  uploadOutside,
  uploadPressure,
} from './support.ts'

const tested = useApp()
let analyst: SignedIn
let colleague: SignedIn
let reviewer: SignedIn
let steward: SignedIn
let reader: SignedIn
let unitId: number

beforeAll(async () => {
  await makeRegion(tested)
  unitId = await makeUnit(tested)
  analyst = await tested.signIn('analyst')
  colleague = await tested.signIn('analyst')
  reviewer = await tested.signIn('analyst', { mayReview: true })
  steward = await tested.signIn('steward', { mayReview: true })
  reader = await tested.signIn('reader')
})

const codeOf = ({ body }: { body: unknown }) => {
  const { code, fields } = body as Problem
  return fields[0]?.code ?? code
}
const detailOf = ({ body }: { body: unknown }) => (body as Problem).detail
const misfit = (found: number) => Math.abs(found / T - 1)

describe('readings that follow the weather', () => {
  it('are corrected by an uploaded barometer, analysed so, and come back as they were when it is switched off', async () => {
    const { id } = await enterWeatherTest(analyst, unitId)
    const before = await inputsOf(analyst, id)
    const spoilt = (await saveAnalysis(analyst, id, 'theis')).body as Analysis
    expect(misfit(spoilt.result.T!.value)).toBeGreaterThan(0.02)

    const { id: seriesId } = await uploadPressure(analyst, id)
    expect((await inputsOf(analyst, id)).sha256).toBe(before.sha256)
    const made = (await correct(analyst, id, barometric(seriesId)).expect(201)).body as CorrectionRecord
    const corrected = await inputsOf(analyst, id)
    const [applied] = corrected.inputs.series[0]!.corrections!
    expect(applied!.outside).toBe('Barometer')
    expect(Math.abs(applied!.record.efficiency! - efficiency)).toBeLessThan(1e-4)
    expect(applied!.record.efficiencySd!).toBeGreaterThan(0)
    expect(applied!.record.antecedent_s).toBe(5 * 86_400)
    expect(corrected.readings[0]!.uncorrected_m).toEqual(before.inputs.series[0]!.drawdown_m)
    expect((await readAnalysis(analyst, spoilt.id)).inputsChanged).toBe(true)

    const good = (await saveAnalysis(analyst, id, 'theis')).body as Analysis
    expect(misfit(good.result.T!.value)).toBeLessThan(2e-3)
    expect(good.result.findings.map(({ code }) => code)).toContain('correction-applied')

    await switchTo(analyst, made, false).expect(200)
    expect(await inputsOf(analyst, id)).toEqual(before)
    expect((await readAnalysis(analyst, spoilt.id)).inputsChanged).toBe(false)
    expect((await readAnalysis(analyst, good.id)).inputsChanged).toBe(true)
    await analyst.delete(`/api/corrections/${made.id}?rowVersion=2`).expect(200)
    expect(await inputsOf(analyst, id)).toEqual(before)
  })

  it('leave a submitted analysis as it is when their corrections change', async () => {
    const { id } = await enterWeatherTest(analyst, unitId)
    const { id: seriesId } = await uploadPressure(analyst, id)
    const made = (await correct(analyst, id, barometric(seriesId)).expect(201)).body as CorrectionRecord
    const submitted = await submitDraft(analyst, (await saveAnalysis(analyst, id, 'theis')).body as Analysis)
    await switchTo(analyst, made, false).expect(200)
    const after = await readAnalysis(analyst, submitted.id)
    expect(after.result).toEqual(submitted.result)
    expect(after.inputsChanged).toBe(true)
    expect(codeOf(await accept(reviewer, after).expect(409))).toBe('analysis/inputs-changed')
  })

  it('are not reviewed by who chose their corrections', async () => {
    const { id } = await enterWeatherTest(analyst, unitId)
    const { id: seriesId } = await uploadPressure(analyst, id)
    await correct(steward, id, barometric(seriesId)).expect(201)
    const submitted = await submitDraft(analyst, (await saveAnalysis(analyst, id, 'theis')).body as Analysis)
    expect(codeOf(await accept(steward, submitted).expect(403))).toBe('review/own-work')
    await accept(reviewer, submitted).expect(200)
  })

  it('are said not to be analysable, and why, when a later log is not covered', async () => {
    const { id, test } = await enterWeatherTest(analyst, unitId)
    const { id: seriesId } = await uploadPressure(analyst, id)
    await correct(analyst, id, barometric(seriesId)).expect(201)
    const well = test.wells.find(({ role }) => role === 'observation')!
    const request = {
      testWellId: well.id,
      mapping: { ...pressureMapping(), value: { column: 1, quantity: 'depth', unit: 'm' } },
    }
    await analyst
      .post(`/api/pumping-tests/${id}/reading-series`)
      .field('request', JSON.stringify(request))
      .attach('file', Buffer.from(`${levelLog()}\n20000,9`), 'longer.csv')
      .expect(201)
    const { inputs, problems } = await inputsOf(analyst, id)
    expect(inputs.series).toEqual([])
    expect(problems.map(({ code }) => code)).toEqual(['analysis/correction-cover'])
  })
})

describe('a correction', () => {
  it('is made by who may edit the test, and seen by who may see it', async () => {
    const entered = await enterWeatherTest(analyst, unitId)
    const { id: seriesId } = await uploadPressure(analyst, entered.id)
    expect(codeOf(await correct(colleague, entered.id, barometric(seriesId)))).toBe('pumping-test/not-editable')
    await correct(analyst, entered.id, barometric(seriesId)).expect(201)
    await reader.get(`/api/pumping-tests/${entered.id}/corrections`).expect(404)
    await reader.get(`/api/outside-series/${seriesId}/rows`).expect(404)
    await publishTest(steward, entered)
    const shown = await correctionsOf(reader, entered.id)
    expect([shown.corrections.length, shown.series.length, shown.mayEdit]).toEqual([1, 1, false])
  })

  it('names no well that is hidden from its reader', async () => {
    const entered = await enterWeatherTest(analyst, unitId)
    const { id: seriesId } = await uploadPressure(analyst, entered.id)
    await correct(analyst, entered.id, { ...barometric(seriesId), wellIds: [entered.observation] }).expect(201)
    await publishTest(steward, entered)
    const wellIds = async (person: SignedIn) =>
      (await correctionsOf(person, entered.id)).corrections.map((one) => one.wellIds)
    expect(await wellIds(reader)).toEqual([[entered.observation]])
    const { rowVersion } = (await steward.get(`/api/wells/${entered.observation}`).expect(200)).body as Well
    await steward
      .put(`/api/wells/${entered.observation}/visibility`)
      .send({ rowVersion, visibility: 'internal', embargoUntil: null })
      .expect(200)
    expect(await wellIds(analyst)).toEqual([[entered.observation]])
    expect(await wellIds(reader)).toEqual([])
  })

  it('is made once for each cause, for wells of the test, and by a series that measures its cause', async () => {
    const { id, pumped } = await enterWeatherTest(analyst, unitId)
    const { id: seriesId } = await uploadPressure(analyst, id)
    const wanted = barometric(seriesId)
    await correct(analyst, id, wanted).expect(201)
    expect(codeOf(await correct(analyst, id, { ...wanted, wellIds: [pumped] }))).toBe('correction/twice')
    const trend = { version: 1 as const, kind: 'trend' as const, slopeMPerS: null }
    expect(codeOf(await correct(analyst, id, { settings: trend, wellIds: [9_999_999] }))).toBe(
      'correction/unknown-well',
    )
    const river = { ...wanted.settings, kind: 'river' as const } as typeof wanted.settings
    expect(codeOf(await correct(analyst, id, { settings: river, wellIds: null }))).toBe('correction/unknown-series')
    await correct(analyst, id, { settings: trend, wellIds: null }).expect(201)
  })

  it('is refused with the well and the remedy where it cannot be applied, and leaves nothing behind', async () => {
    const short = levelLog()
      .split('\n')
      .filter((line) => !line.startsWith('-') || /^-(30|60),/.test(line))
      .join('\n')
    const { id, test } = await enterWeatherTest(analyst, unitId, short)
    const { id: seriesId } = await uploadPressure(analyst, id)
    const answer = await correct(analyst, id, barometric(seriesId)).expect(400)
    expect(codeOf(answer)).toBe('correction/refused')
    const { code } = test.wells.find(({ role }) => role === 'observation')!
    expect(detailOf(answer)).toContain(`${code}: This correction needs 6 readings before pumping`)
    expect((await correctionsOf(analyst, id)).corrections).toEqual([])
  })

  it('that somebody else changed meanwhile is a conflict', async () => {
    const { id } = await enterWeatherTest(analyst, unitId)
    const { id: seriesId } = await uploadPressure(analyst, id)
    const made = (await correct(analyst, id, barometric(seriesId)).expect(201)).body as CorrectionRecord
    await switchTo(steward, made, false).expect(200)
    expect(codeOf(await switchTo(analyst, made, false).expect(409))).toBe('edit/conflict')
  })
})

describe('a series from outside', () => {
  it('keeps every line with its fate, and the file as it came', async () => {
    const { id } = await enterWeatherTest(analyst, unitId)
    const text = `${pressureLog()}\n2900,n/a`
    const answer = await uploadOutside(analyst, id, text).expect(201)
    const { series, counts } = answer.body as { series: { id: number; lowest: number }; counts: Record<string, number> }
    expect(counts['readings/value-missing']).toBe(1)
    expect(series.lowest).toBeGreaterThan(95_000)
    const rows = await analyst.get(`/api/outside-series/${series.id}/rows?only=not-taken`).expect(200)
    const last = (rows.body as { items: OutsideRow[] }).items.at(-1)!
    expect([last.raw, last.value, last.issues[0]!.code]).toEqual(['2900,n/a', null, 'readings/value-missing'])
    const file = await analyst.get(`/api/outside-series/${series.id}/file`).buffer(true).expect(200)
    expect(Buffer.from(file.body as Buffer).toString()).toBe(text)
  })

  it.each([
    ['one value', 'minutes,pressure\n0,1013', 'hPa', 'correction/single-value'],
    ['values that do not move', 'minutes,pressure\n-10,1013\n0,1013\n900,1013', 'hPa', 'correction/constant'],
    ['the wrong unit', pressureLog(), 'mH2O', 'correction/pressure-swing'],
    ['a logger under water', pressureLog(-100, 200, (t) => 15 + t / 1e4), 'hPa', 'correction/pressure-high'],
    ['another time', pressureLog(100_000, 101_000), 'hPa', 'correction/no-overlap'],
    ['a mistyped time', 'minutes,pressure\n-2.9e306,1012\n0,1013\n2.9e306,1014', 'hPa', 'correction/far-times'],
    ['a unit of length', pressureLog(), 'm', 'correction/unit'],
  ])('with %s is refused', async (_, text, unit, code) => {
    const { id } = await enterWeatherTest(analyst, unitId)
    const answer = await uploadOutside(analyst, id, text, { mapping: pressureMapping(unit) }).expect(400)
    expect(codeOf(answer)).toBe(code)
    expect((await correctionsOf(analyst, id)).series).toEqual([])
  })

  it('belongs to no test whose readings it could not correct', async () => {
    const slug = await enterKind(analyst, { unitId, details: makeSlugDetails() })
    expect(codeOf(await uploadOutside(analyst, slug.id, pressureLog()))).toBe('correction/wrong-kind')
  })

  it('with clock times holds the start of its test, which its times were read from', async () => {
    const { id, pumped, observation, test } = await enterWeatherTest(analyst, unitId)
    const time = { kind: 'clock' as const, column: 0, dateColumn: null, dateOrder: 'ymd' as const, zone: null }
    const text = 'time,pressure\n2019-03-10 09:00,1013\n2019-03-14 09:00,1009\n2019-03-16 09:00,1015'
    const uploaded = await uploadOutside(analyst, id, text, { mapping: { ...pressureMapping(), time } }).expect(201)
    const { series } = uploaded.body as { series: { id: number; firstS: number } }
    expect(series.firstS).toBe(-4 * 86_400)
    const move = () =>
      analyst.put(`/api/pumping-tests/${id}`).send({
        ...inputOf({ unitId }, pumped, observation),
        startLocal: '2019-03-13T09:00',
        rowVersion: test.rowVersion,
      })
    expect(codeOf(await move())).toBe('pumping-test/start-series')
    await analyst.delete(`/api/outside-series/${series.id}?rowVersion=1`).expect(200)
    await move().expect(200)
  })

  it('is kept while a correction follows it, and replaced by another that the correction follows then', async () => {
    const { id } = await enterWeatherTest(analyst, unitId)
    const old = await uploadPressure(analyst, id)
    await correct(analyst, id, barometric(old.id)).expect(201)
    const remove = (seriesId: number) => analyst.delete(`/api/outside-series/${seriesId}?rowVersion=1`)
    expect(codeOf(await remove(old.id).expect(409))).toBe('correction/series-in-use')
    const tooShort = await uploadOutside(analyst, id, pressureLog(-1000), { replaces: old.id })
    expect(codeOf(tooShort)).toBe('correction/refused')
    const answer = await uploadOutside(analyst, id, pressureLog(), { label: 'Roof', replaces: old.id }).expect(201)
    const { series } = answer.body as { series: { id: number } }
    const { corrections, series: left } = await correctionsOf(analyst, id)
    expect(left.map((one) => one.id)).toEqual([series.id])
    expect(corrections[0]!.settings).toMatchObject({ seriesId: series.id })
    expect((await inputsOf(analyst, id)).inputs.series[0]!.corrections![0]!.outside).toBe('Roof')
    const administrator = await tested.signIn('administrator')
    const trail = (await administrator.get('/api/audit-trail?limit=1').expect(200)).body as { items: unknown[] }
    expect(trail.items[0]).toMatchObject({
      action: 'outside-series/replace',
      details: { replaces: old.id, followed: [{ correctionId: corrections[0]!.id }] },
    })
  })
})
