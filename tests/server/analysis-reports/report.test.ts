import request from 'supertest'
import { beforeAll, describe, expect, it } from 'vitest'
import type { Analysis } from '#shared/contracts/analyses.ts'
import { paperTheme } from '#shared/charts/paper-theme.ts'
import type { AnalysisReport } from '#shared/words/report/document.ts'
import { chartSvg } from '../../../server/reports/draw-charts.ts'
import { printed } from '../../../server/reports/printed.ts'
import { reportDefinition } from '../../../server/reports/report-pdf.ts'
import { writePdf } from '../../../server/reports/write-pdf.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { createWell, makeRegion, makeUnit, saveAnalysis } from '../../support/domain.ts'
import { decide, makeSite, siteInput, submit, testWithReadings } from '../pumping-tests/support.ts'

const tested = useApp()
let analyst: SignedIn
let reviewer: SignedIn
let reader: SignedIn

beforeAll(async () => {
  await makeRegion(tested)
  analyst = await tested.signIn('analyst')
  reviewer = await tested.signIn('analyst', { mayReview: true })
  reader = await tested.signIn('reader')
})

const reportOf = (person: SignedIn, id: number, query: Record<string, string> = {}) =>
  person.get(`/api/pumping-tests/${id}/report`).query(query).buffer(true)

const isPdf = (body: unknown) => {
  const bytes = body as Buffer
  const ends = bytes.subarray(-1024).toString('latin1')
  return bytes.subarray(0, 5).toString('latin1') === '%PDF-' && ends.includes('%%EOF')
}

describe('The report of a test', () => {
  it('comes as a PDF to be saved, with a name that any system keeps', async () => {
    const test = await testWithReadings(analyst, siteInput(await makeSite(tested, analyst)))
    const saved = (await saveAnalysis(analyst, test.id, 'theis')).body as Analysis
    const submitted = (await submit(analyst, saved).expect(200)).body as Analysis
    await decide(reviewer, submitted, 'accepted').expect(200)
    const answer = await reportOf(analyst, test.id).expect(200)
    expect(answer.headers['content-type']).toBe('application/pdf')
    expect(answer.headers['content-disposition']).toBe(`attachment; filename=${test.wellCode}-2019-03-14-report.pdf`)
    expect(isPdf(answer.body)).toBe(true)
  })

  it('is longer with an analysis, its plot and its conditions', async () => {
    const test = await testWithReadings(analyst, siteInput(await makeSite(tested, analyst)))
    const without = (await reportOf(analyst, test.id).expect(200)).body as Buffer
    await saveAnalysis(analyst, test.id, 'cooper-jacob')
    const withOne = (await reportOf(analyst, test.id, { unitSystem: 'us', direction: 'up' }).expect(200)).body as Buffer
    expect(isPdf(without)).toBe(true)
    expect(withOne.length).toBeGreaterThan(without.length + 3_000)
  })

  it('is written for tests without readings too', async () => {
    const { id } = (await analyst.post('/api/pumping-tests').send(siteInput(await makeSite(tested, analyst)))).body as {
      id: number
    }
    expect(isPdf((await reportOf(analyst, id).expect(200)).body)).toBe(true)
  })

  it('is written for a slug test too', async () => {
    const wellId = await createWell(analyst)
    const unitId = await makeUnit(tested)
    const details = {
      version: 1,
      kind: 'slug',
      ...{ casingRadiusM: 0.05, wellRadiusM: 0.08, screenRadiusM: 0.08, screenLengthM: 5, screenTopM: 20 },
      ...{ filterPack: null, radiusError: 0.05, anisotropy: 1, storage: { value: 1e-4, logSd: 0.5 }, repeats: [] },
    } as const
    const input = siteInput({ unitId, pumped: wellId, observation: 0 }, { observationWells: [], rateSteps: [] })
    const { body } = await analyst
      .post('/api/pumping-tests')
      .send({ ...input, details })
      .expect(201)
    expect(isPdf((await reportOf(analyst, (body as { id: number }).id).expect(200)).body)).toBe(true)
  })

  it('is for those only who may see the test', async () => {
    const test = await testWithReadings(analyst, siteInput(await makeSite(tested, analyst)))
    await reportOf(reader, test.id).expect(404)
    await request(tested.app).get(`/api/pumping-tests/${test.id}/report`).expect(401)
    await reportOf(analyst, 987_654).expect(404)
    await reportOf(analyst, test.id, { unitSystem: 'cubits' }).expect(400)
  })

  it('takes hostile text for text, in its name and in its pages', async () => {
    const hostile = `<svg onload=alert(1)>"';\r\nX: y${'w'.repeat(90)}\u0000\u202E💧`
    const unitId = await makeUnit(tested, { name: hostile.slice(0, 60) })
    const pumped = await createWell(analyst, { code: `"</text>;\u202E ${'a'.repeat(20)}` })
    const observation = await createWell(analyst, { x: -21.199, code: '../../etc/passwd&<b>' })
    const site = { unitId, pumped, observation }
    const test = await testWithReadings(analyst, siteInput(site, { conditions: hostile.replace('\u0000', '') }))
    const saved = (await saveAnalysis(analyst, test.id, 'theis')).body as Analysis
    await submit(analyst, saved).expect(200)
    const answer = await reportOf(analyst, test.id).expect(200)
    expect(isPdf(answer.body)).toBe(true)
    expect(answer.headers['content-disposition']).toMatch(/^attachment; filename=text-a{20}-2019-03-14-report\.pdf$/)
  })
})

const makeReport = (overrides: Partial<AnalysisReport> = {}): AnalysisReport => ({
  kind: 'Analysis report',
  title: 'V-0001',
  facts: '',
  sections: [],
  made: 'Made today.',
  ...overrides,
})

describe('the pages of a report', () => {
  it('hold no invisible characters and no word that runs over its column', () => {
    expect(printed('a\u202Eb\u0000c\u200Bd\tline\nnext')).toBe('abcd\tline\nnext')
    expect(
      printed('x'.repeat(60))
        .split(' ')
        .map((part) => part.length),
    ).toEqual([28, 28, 4])
    expect(
      printed('x'.repeat(40), 5)
        .split(' ')
        .map((part) => part.length),
    ).toEqual([18, 18, 4])
    expect(printed('An ordinary sentence, 12.5 m²/d.')).toBe('An ordinary sentence, 12.5 m²/d.')
    expect(printed('1\u202f440 min')).toBe('1\u00a0440 min')
  })

  it('hold every block in its order, and leave a picture out that cannot be drawn', () => {
    const blocks: AnalysisReport['sections'][number]['blocks'] = [
      { kind: 'facts', facts: [{ label: 'Well', text: 'V-0001' }] },
      { kind: 'plot', analysisId: 3, caption: 'Missing' },
      { kind: 'table', caption: 'Results', head: ['Quantity', 'Value'], rows: [['T', '640 m²/d']] },
      { kind: 'marked', items: [{ severity: 'bad', word: 'Problem', text: 'Not a number.' }] },
      { kind: 'sketch' },
    ]
    const report = makeReport({ sections: [{ id: 'a', title: 'Section', blocks }] })
    const text = JSON.stringify(reportDefinition(report, { sketch: null, plot: () => null }).content)
    const places = ['Section', 'V-0001', '640 m²/d', 'Problem'].map((part) => text.lastIndexOf(part))
    expect([...places].sort((a, b) => a - b)).toEqual(places)
    expect(Math.min(...places)).toBeGreaterThan(0)
    expect(text).not.toContain('Missing')
  })

  it('open no address and no file, even where a picture asks for one', async () => {
    const svg =
      '<svg xmlns="http://www.w3.org/2000/svg" xmlns:xlink="http://www.w3.org/1999/xlink" width="20" height="20"><image xlink:href="/etc/hostname" width="9" height="9"/><image xlink:href="http://127.0.0.1:9/x.png" width="9" height="9"/></svg>'
    const report = makeReport({ sections: [{ id: 'a', title: 'A', blocks: [{ kind: 'sketch' }] }] })
    const bytes = await writePdf(reportDefinition(report, { sketch: svg, plot: () => null }))
    expect(isPdf(Buffer.from(bytes))).toBe(true)
  })

  it('have charts in the font of the document, with names as text', () => {
    const option = {
      xAxis: { type: 'value' as const },
      yAxis: { type: 'value' as const },
      textStyle: { fontFamily: "Roboto, system-ui, 'Helvetica Neue'", color: paperTheme.ink },
      series: [
        {
          type: 'scatter' as const,
          data: [[1, 2]],
          label: { show: true, formatter: '<script>alert("1")</script>' },
        },
      ],
    }
    const svg = chartSvg(option, { width: 300, height: 200 })
    expect(svg).toContain('&lt;script&gt;')
    expect(svg).not.toContain('<script')
    expect(svg).not.toContain('system-ui')
  })
})
