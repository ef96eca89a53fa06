import Papa from 'papaparse'
import { beforeAll, describe, expect, it } from 'vitest'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion, makeUnit } from '../../support/domain.ts'
import { keepBooks, wholly } from '../../support/values.ts'

const tested = useApp()
let reader: SignedIn
let unitId: number

/** What a spreadsheet would run when it stands at the beginning of a cell. */
const dangerous = ['=1+1', '+1', '-1', '@SUM(A1)', '\tTabbed']

beforeAll(async () => {
  await makeRegion(tested)
  unitId = await makeUnit(tested, { name: '=HYPERLINK("http://evil.example")' })
  const { adopt } = await keepBooks(tested)
  reader = await tested.signIn('reader')
  for (const code of dangerous) await adopt({ code: `${code}`, units: wholly(unitId), T: 1e-3 })
  await adopt({ code: 'Comma, "quoted"', units: wholly(unitId), T: 2e-3, S: 1e-4, storageClass: 'elastic', K: 1e-4 })
  await adopt({ code: 'Hidden', units: wholly(unitId), visibility: 'internal' })
})

async function csv(query = '', person = reader) {
  const answer = await person.get(`/api/adopted-values.csv?${query}`).buffer(true).expect(200)
  const text = answer.text
  const { data } = Papa.parse<Record<string, string>>(text.replace(/^\uFEFF/, ''), {
    header: true,
    skipEmptyLines: true,
  })
  return { text, rows: data, headers: answer.headers as Record<string, string> }
}

describe('the export', () => {
  it('is a CSV to be saved, with a byte order mark and lines that end as the standard says', async () => {
    const { text, headers } = await csv()
    expect(headers['content-type']).toMatch(/^text\/csv; charset=utf-8/i)
    expect(headers['content-disposition']).toContain('attachment; filename=regional-table.csv')
    expect(text.startsWith('\uFEFFwell,')).toBe(true)
    // RFC 4180: CRLF.
    expect(text.endsWith('\r\n')).toBe(true)
    expect(text.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/)
  })

  it('names the unit in the header and converts every number to it', async () => {
    const row = (wanted: { rows: Record<string, string>[] }) =>
      wanted.rows.find(({ well, quantity }) => well === 'Comma, "quoted"' && quantity === 'T')!
    const metric = row(await csv('unitSystem=metric'))
    expect(metric.unit).toBe('m²/d')
    expect(Number(metric['transmissivity_m²/d'])).toBeCloseTo(172.8, 9)
    expect(Number(metric.value)).toBeCloseTo(172.8, 9)
    // NIST SP 811: 1 ft is 0.3048 m exactly.
    const us = row(await csv('unitSystem=us'))
    expect(Number(us['transmissivity_ft²/d'])).toBeCloseTo(172.8 / 0.3048 ** 2, 6)
    expect(Number(us.low_95) / Number(metric.low_95)).toBeCloseTo(1 / 0.3048 ** 2, 9)
  })

  it('keeps storage without a unit and conductivity in its own column', async () => {
    const { rows } = await csv('unitSystem=us')
    const S = rows.find(({ quantity }) => quantity === 'S')!
    expect(Number(S.storativity_1)).toBeCloseTo(1e-4, 12)
    expect(S['transmissivity_ft²/d']).toBe('')
    const K = rows.find(({ quantity }) => quantity === 'K')!
    expect(Number(K['conductivity_ft/d'])).toBeCloseTo((1e-4 * 86_400) / 0.3048, 9)
  })

  it('writes numbers with all their digits and a decimal point', async () => {
    const { rows } = await csv('unitSystem=si')
    const T = rows.find(({ well, quantity }) => well === 'Comma, "quoted"' && quantity === 'T')!
    expect(Number(T.value)).toBeCloseTo(2e-3, 15)
    expect(Number(T.longitude_deg_wgs84)).toBeCloseTo(-21.2, 9)
  })

  it('disarms text that a spreadsheet would run as a formula', async () => {
    const { rows } = await csv()
    for (const well of rows.map((row) => row.well!)) expect(well).not.toMatch(/^[=+\-@\t\r]/)
    expect(rows.filter(({ well }) => well!.startsWith("'")).length).toBe(dangerous.length)
    expect(rows[0]!.aquifer_unit).toBe('\'=HYPERLINK("http://evil.example")')
  })

  it('leaves negative numbers numbers: they are no text of anybody', async () => {
    const { rows } = await csv()
    expect(Number(rows[0]!.longitude_deg_wgs84)).toBeLessThan(0)
    expect(Number(rows[0]!.latitude_deg_wgs84)).toBeLessThan(0)
  })

  it('quotes commas and quotation marks so that they come back as they were', async () => {
    expect((await csv('text=Comma')).rows.map(({ well }) => well)).toContain('Comma, "quoted"')
  })

  it('holds what the filters leave, and only what the person may see', async () => {
    expect((await csv('quantity=S')).rows).toHaveLength(1)
    expect((await csv()).rows.map(({ well }) => well)).not.toContain('Hidden')
    expect((await csv('', await tested.signIn('analyst'))).rows.map(({ well }) => well)).toContain('Hidden')
  })

  it('falls back to the usual units for a system that does not exist', async () => {
    expect((await csv('unitSystem=cubits')).rows[0]!.unit).toBe('m²/d')
  })

  it('is a head without rows where nothing fits', async () => {
    const { text, rows } = await csv('text=nothing-like-it')
    expect(rows).toEqual([])
    expect(text.startsWith('\uFEFFwell,')).toBe(true)
  })
})
