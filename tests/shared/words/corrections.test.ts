import { describe, expect, it } from 'vitest'
import type { WorkbenchInputs } from '#shared/contracts/analyses.ts'
import { outsideFindings, outsideRefusal } from '#shared/hydraulics/corrections/outside-check.ts'
import { unitSystemById } from '#shared/quantities/systems.ts'
import { correctionFigures, correctionSpan } from '#shared/words/corrections.ts'
import { findingText } from '#shared/words/findings.ts'
import { inputProblemText } from '#shared/words/input-problems.ts'
import { outsideIssueText, outsideText } from '#shared/words/outside-series.ts'
import { correctionsSection } from '#shared/words/report/corrections-section.ts'
import type { ReportGiven } from '#shared/words/report/document.ts'
import { makeInputs, makeSeries } from '../hydraulics/make-inputs.ts'

const [metric, us] = [unitSystemById('metric'), unitSystemById('us')]
const plain = (text: string) => text.replaceAll('\u202f', ' ')
const trend = {
  kind: 'trend' as const,
  given: false,
  outside: null,
  record: { start_m: 0, slope_m_s: 2e-7, slopeSd_m_s: 1e-8, explained: 0.9, antecedent_s: 432_000, readings: 120 },
  findings: [],
}

describe('figures of a correction', () => {
  it('are told with their errors in the reader’s units', () => {
    expect(plain(correctionFigures(trend, metric))).toBe(
      'drawdown changes by 0.017 m ± 8.6×10⁻⁴ m in a day, explains 90 % of what moved before pumping',
    )
    expect(correctionFigures(trend, us)).toContain('0.057 ft')
    expect(correctionSpan(trend)).toBe('5 d before pumping, 120 readings')
  })

  it('are marked where they were given, and were learned from nothing then', () => {
    const given = {
      kind: 'river' as const,
      given: true,
      outside: 'Weir',
      record: { efficiency: 0.3, lag_s: 0 },
      findings: [],
    }
    expect(correctionFigures(given, metric)).toBe('efficiency 0.3, no lag, as given')
    expect(correctionSpan(given)).toBe('')
  })
})

describe('a series from outside', () => {
  it('is told with span and values, and its rows in its own unit', () => {
    const facts = {
      quantity: 'air-pressure' as const,
      firstS: -172_800,
      lastS: 172_800,
      lowest: 98_000,
      highest: 101_000,
    }
    expect(plain(outsideText(facts, metric))).toBe('Air pressure, −2 d to 2 d, 98 to 101 kPa')
    const spike = outsideIssueText('air-pressure', 'readings/spike', { value_m: 90_000, median_m: 1e5 }, metric)
    expect(plain(spike)).toMatch(/^The value 90 kPa stands out/)
  })

  it('cannot be what no air and no river does', () => {
    expect(outsideRefusal('air-pressure', { lowest: 98e3, highest: 103e3 })).toBeNull()
    expect(outsideRefusal('air-pressure', { lowest: 80e3, highest: 100e3 })).toBe('pressure-swing')
    expect(outsideRefusal('air-pressure', { lowest: 150e3, highest: 151e3 })).toBe('pressure-high')
    expect(outsideRefusal('river-stage', { lowest: 0, highest: 200 })).toBe('stage-swing')
    expect(outsideRefusal('tide-gauge', { lowest: 1, highest: 1 })).toBe('constant')
    const [low] = outsideFindings('air-pressure', { lowest: -200, highest: 300 })
    expect(findingText(low!, metric)).toContain('Where the barometer shows differences only')
  })
})

describe('a log that cannot be corrected any more', () => {
  it('is told why and what to do', () => {
    const text = inputProblemText('analysis/correction-cover', { from_s: 0, to_s: 3600 }, metric)
    expect(text).toMatch(/^A correction cannot be applied any more\. The uploaded series .* Upload a longer one/)
    expect(inputProblemText('readings/no-antecedent', {}, metric)).toContain('No reading was taken before pumping')
  })
})

describe('the report', () => {
  const given = (inputs: WorkbenchInputs['inputs']) => ({ snapshot: { inputs }, units: metric }) as ReportGiven

  it('has a table of corrections and one of other wells, and neither where there is none', () => {
    const other = {
      wellId: null,
      label: 'Dairy',
      rates: [{ start_s: -3600, rate_m3_s: 0.005 }],
      fitted: true,
      distance_m: 400,
      bearing_deg: 90,
      distances: [],
    }
    const inputs = makeInputs({ series: [makeSeries({ corrections: [trend] })], otherWells: [other] })
    const [section] = correctionsSection(given(inputs))
    const [corrections, others] = section!.blocks
    expect(corrections).toMatchObject({ kind: 'table', caption: 'Corrections of the readings' })
    expect((corrections as { rows: string[][] }).rows[0]!.slice(0, 3)).toEqual(['OB-1', 'Trend before pumping', '–'])
    expect(plain((others as { rows: string[][] }).rows[0]!.join(' · '))).toBe(
      'Dairy · 400 m · east · 5 L/s from −60 min · one factor fitted',
    )
    expect(correctionsSection(given(makeInputs()))).toEqual([])
  })
})
