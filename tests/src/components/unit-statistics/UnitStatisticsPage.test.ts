import { nextTick } from 'vue'
import { describe, expect, it } from 'vitest'
import { figuresCsv } from '../../../../src/components/unit-statistics/figure-rows.ts'
import UnitStatisticsPage from '../../../../src/components/unit-statistics/UnitStatisticsPage.vue'
import { useUnits } from '../../../../src/composables/useUnits.ts'
import { usePreferences } from '../../../../src/stores/preferences.ts'
import { fakeServer } from '../../support/fake-server.ts'
import { mountWith, runWith, settle } from '../../support/mount.ts'
import { makeFigures, makeOverviewValue, makeStatistics } from './make.ts'

const plain = (text: string) => text.replaceAll(/[\u202f\u00a0]/g, ' ').replaceAll(/\s+/g, ' ')

async function mounted(overrides = {}) {
  fakeServer({
    'GET /api/aquifer-units': () => ({ body: { items: [] } }),
    'PUT /api/account/preferences': ({ body }) => ({ body }),
  })
  const page = await mountWith(UnitStatisticsPage, {
    props: { statistics: makeStatistics(overrides) },
    path: '/regional-table/aquifer-units/1',
  })
  await settle()
  return page
}

describe('the page of a unit', () => {
  it('says plain and declustered figures beside each other, and both intervals of the mean', async () => {
    const text = plain((await mounted()).text())
    expect(text).toContain('Geometric mean86.4 m²/d54.5 m²/d')
    expect(text).toContain('27.3 to 273 m²/d')
    expect(text).toContain('counting 6 sites more than 500 m apart as independent')
    expect(text).toContain('If wells were independent')
  })

  it('says how many independent wells the kriged mean is worth', async () => {
    const meanByKriging = { mean: -3.1, low: -3.7, high: -2.5, effectiveN: 4.2 }
    const text = plain((await mounted({ figures: makeFigures({ meanByKriging }) })).text())
    expect(text).toContain('as sure as 4.2 independent wells')
    expect(text).not.toContain('sites more than 500 m apart as independent')
  })

  it('names outliers with the way to their value', async () => {
    const odd = makeOverviewValue({ valueId: 9, wellCode: 'V-0099', log10: 0, robustZ: 8.1 })
    const page = await mounted({ values: [...makeStatistics().values, odd], outlierIds: [9] })
    const links = page.findAll('a').map((link) => [link.text(), link.attributes('href')])
    expect(links).toContainEqual(['V-0099', '/regional-table/9'])
  })

  it('says by how much slug tests read lower than curve fits', async () => {
    const slug = { group: 'slug', n: 9, mean: -4, fromCurves: { difference: -1, low: -1.3, high: -0.7 } }
    const text = plain((await mounted({ methods: [...makeStatistics().methods, slug] })).text())
    expect(text).toContain('Slug tests98.64 m²/d0.10 (0.050 to 0.20)reads lower here')
  })

  it('counts the pairs of specific capacity where they are too few for a line', async () => {
    expect(plain((await mounted()).text())).toContain('needs 25 pairs: no well has both')
  })

  it('follows a switch of units at once, with round classes in the new unit', async () => {
    const page = await mounted()
    await page.findAll('button').find((button) => button.text() === 'Read as a table')!.trigger('click') // prettier-ignore
    expect(plain(page.text())).toContain('transmissivity, m²/d')
    await usePreferences().choose({ unitSystem: 'us' })
    await nextTick()
    expect(plain(page.text())).toContain('Geometric mean930 ft²/d')
    expect(plain(page.text())).toContain('transmissivity, ft²/d')
  })

  it('says what is missing where no value may be used', async () => {
    const text = (await mounted({ figures: null, values: [], methods: [] })).text()
    expect(text).toContain('No value to describe')
    expect(text).not.toContain('Histogram')
  })
})

describe('the figures as CSV', () => {
  it('stand in the reader’s units, and no name runs as a formula', () => {
    const units = runWith(useUnits)
    const unit = { ...makeStatistics().unit, name: '=HYPERLINK("x")' }
    const csv = figuresCsv(makeStatistics({ unit }), 'transmissivity', units)
    const lines = csv.slice(1).trim().split('\r\n')
    expect(lines[0]).toBe('aquifer unit,quantity,figure,plain,declustered,unit,basis')
    const [mean] = lines.filter((line) => line.includes('Geometric mean'))
    expect(mean!.startsWith(`"'=HYPERLINK`)).toBe(true)
    expect(Number(mean!.split(',').at(-4))).toBeCloseTo(86.4, 6)
    expect(mean).toContain('m²/d')
    expect(lines.find((line) => line.includes('Interval of the mean, 95 % low'))).toContain('6 sites')
  })
})
