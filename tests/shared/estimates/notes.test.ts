import { describe, expect, it } from 'vitest'
import { estimateAt } from '#shared/estimates/estimate-at.ts'
import type { NoteCode, Severity } from '#shared/estimates/note-types.ts'
import { NOTE_RULES } from '#shared/estimates/notes.ts'
import type { EstimateContext, EstimateResult, Point, SiteValue, UnitModel } from '#shared/estimates/types.ts'
import type { Variogram } from '#shared/geostatistics/variogram.ts'
import { makeContext, makeCrossValidation, makeModel, makeRing, makeSiteValue, square } from './make.ts'

interface Scene {
  place?: Point
  values?: SiteValue[]
  model?: Partial<UnitModel> | null
  variogram?: Partial<Variogram>
  context?: Partial<EstimateContext>
}

const origin = { x: 0, y: 0 }

/** Two rings of firm, agreeing tests around the place: 12 at 1.5 km and 12 at 5 km, in a unit 40 km wide. */
const rings = (overrides: Partial<SiteValue> = {}): SiteValue[] => [
  ...makeRing(12, 1500, { evidence: 'firm', error: 0.1, ...overrides }),
  ...makeRing(12, 5000, { evidence: 'firm', error: 0.1, ...overrides }),
]

function look({ place = origin, values = rings(), model = {}, variogram = {}, context = {} }: Scene): EstimateResult {
  const structure: Variogram = { model: 'spherical', nugget: 0.01, sill: 0.05, range: 6000, ...variogram }
  const fitted = model && makeModel({ variogram: structure, nodes: [{ weight: 1, variogram: structure }], ...model })
  return estimateAt(place, values, fitted, makeContext(context))
}

/** Every other test says −1.5, the rest −3.5. */
const quarrelling = rings().map((value, i) => ({ ...value, log10: i % 2 === 0 ? -1.5 : -3.5 }))
const besideThePlace = makeSiteValue({ id: 'beside', label: 'V-0042', x: 30, y: 0, error: 0.05 })

interface Case {
  code: NoteCode
  severity: Severity
  /** A picture in which the note is made, and one in which it is not. */
  made: Scene
  notMade: Scene
  params?: object
}

const CASES: Case[] = [
  {
    code: 'outside-unit',
    severity: 'bad',
    made: { place: { x: 25_000, y: 0 } },
    notMade: {},
    params: { unit: 'Tarrow Gravels', distance_m: 5000 },
  },
  {
    code: 'too-few-values',
    severity: 'bad',
    made: { values: makeRing(3, 1500), model: null },
    notMade: { values: makeRing(4, 1500), model: null },
    params: { n: 3, sites: 3 },
  },
  {
    code: 'values-near',
    severity: 'good',
    made: {},
    notMade: { variogram: { range: 3000 } },
    params: { within: 24, firm: 24, range_m: 6000 },
  },
  { code: 'values-some', severity: 'note', made: { variogram: { range: 3000 } }, notMade: {}, params: { within: 12 } },
  {
    code: 'nearest-far',
    severity: 'caution',
    made: { variogram: { range: 2000 } },
    notMade: { variogram: { range: 3000 } },
  },
  {
    code: 'beyond-range',
    severity: 'bad',
    made: { variogram: { range: 1000 } },
    notMade: { variogram: { range: 2000 } },
    params: { within: 0, range_m: 1000 },
  },
  {
    code: 'unit-mean-only',
    severity: 'caution',
    made: { values: makeRing(8, 5000), model: null },
    notMade: {},
    params: { n: 8, sites: 8 },
  },
  { code: 'one-cluster', severity: 'bad', made: { values: makeRing(12, 1500) }, notMade: {} },
  { code: 'evidence-firm', severity: 'good', made: {}, notMade: { values: rings({ evidence: 'fair' }) } },
  {
    code: 'evidence-mixed',
    severity: 'note',
    made: { values: rings({ evidence: 'fair' }) },
    notMade: {},
    params: { firm: 0, fair: 24, slight: 0 },
  },
  {
    code: 'evidence-slight',
    severity: 'caution',
    made: { values: rings({ evidence: 'slight' }) },
    notMade: { values: rings({ evidence: 'fair' }) },
    params: { share: 1 },
  },
  { code: 'surrounded', severity: 'good', made: {}, notMade: { place: { x: 9000, y: 0 } }, params: { n: 24 } },
  {
    code: 'outside-hull',
    severity: 'caution',
    made: { place: { x: 9000, y: 0 } },
    notMade: {},
    params: { distance_m: 4000 },
  },
  {
    code: 'edge-near',
    severity: 'note',
    made: { place: { x: 19_600, y: 0 } },
    notMade: { place: { x: 19_000, y: 0 } },
    params: { unit: 'Tarrow Gravels' },
  },
  {
    code: 'coast-near',
    severity: 'note',
    made: { context: { coastDistance_m: 800 } },
    notMade: { context: { coastDistance_m: 1200 } },
    params: { distance_m: 800 },
  },
  {
    code: 'barrier-between',
    severity: 'caution',
    made: { context: { barriers: [[[1000, -9000], [1000, 9000]]] } }, // prettier-ignore
    notMade: { context: { barriers: [[[9000, -9000], [9000, 9000]]] } }, // prettier-ignore
    params: { hidden: 8 },
  },
  { code: 'neighbours-agree', severity: 'good', made: {}, notMade: { values: quarrelling }, params: { n: 8 } },
  { code: 'neighbours-disagree', severity: 'caution', made: { values: quarrelling }, notMade: {}, params: { n: 8 } },
  { code: 'interval-narrow', severity: 'good', made: {}, notMade: { variogram: { nugget: 0.16 } } },
  {
    code: 'interval-wide',
    severity: 'caution',
    made: { variogram: { nugget: 0.16 } },
    notMade: { variogram: { nugget: 0.5 } },
  },
  {
    code: 'interval-very-wide',
    severity: 'bad',
    made: { variogram: { nugget: 0.5 } },
    notMade: { variogram: { nugget: 0.16 } },
  },
  {
    code: 'coverage-holds',
    severity: 'good',
    made: { context: { crossValidation: makeCrossValidation(100, 94) } },
    notMade: { context: { crossValidation: makeCrossValidation(100, 80) } },
    params: { inside: 94, n: 100, share: 0.94 },
  },
  {
    code: 'coverage-count',
    severity: 'note',
    made: { model: { crossValidation: makeCrossValidation(12, 11) } },
    notMade: { model: { crossValidation: makeCrossValidation(30, 29) } },
    params: { inside: 11, n: 12 },
  },
  {
    code: 'coverage-fails',
    severity: 'caution',
    made: { context: { crossValidation: makeCrossValidation(100, 80) } },
    notMade: { context: { crossValidation: makeCrossValidation(100, 94) } },
  },
  {
    code: 'spread-rescaled',
    severity: 'note',
    made: { model: { spreadFactor: 1.4 } },
    notMade: {},
    params: { factor: 1.4 },
  },
  {
    code: 'variogram-assumed',
    severity: 'caution',
    made: { model: { rule: 'assumed', assumedFrom: 'the Fennick Limestone' } },
    notMade: {},
    params: { from: 'the Fennick Limestone' },
  },
  {
    code: 'variogram-poor',
    severity: 'caution',
    made: { variogram: { nugget: 0.09, sill: 0.01 } },
    notMade: {},
    params: { nuggetShare: 0.9 },
  },
  { code: 'errors-exceed-scatter', severity: 'note', made: { model: { errorsExceedScatter: true } }, notMade: {} },
  {
    code: 'one-test-dominates',
    severity: 'caution',
    made: { values: [...makeRing(12, 5000), besideThePlace] },
    notMade: {},
    params: { label: 'V-0042' },
  },
  {
    code: 'second-opinion-differs',
    severity: 'caution',
    // A poor value next to the place: the inverse distance follows it, kriging knows its error.
    made: { values: [...rings(), { ...besideThePlace, log10: -1, error: 0.5 }] },
    notMade: { values: [...rings(), besideThePlace] },
  },
  {
    code: 'old-tests',
    severity: 'note',
    made: { values: rings({ year: 1984 }) },
    notMade: { values: rings({ year: null }) },
    params: { share: 1, years: 30 },
  },
  {
    code: 'position-poor',
    severity: 'note',
    made: { values: [...makeRing(12, 5000), { ...besideThePlace, positionAccuracy_m: 200 }] },
    notMade: { values: [...makeRing(12, 5000), besideThePlace] },
    params: { label: 'V-0042', accuracy_m: 200 },
  },
  {
    code: 'depth-outside-screens',
    severity: 'caution',
    made: { values: rings({ screenTop_m: 10, screenBottom_m: 30 }), context: { depth_m: 80 } },
    notMade: { values: rings({ screenTop_m: 10, screenBottom_m: 30 }), context: { depth_m: 25 } },
    params: { depth_m: 80, top_m: 10, bottom_m: 30 },
  },
  {
    code: 'composite-values',
    severity: 'note',
    made: { values: rings({ composite: true, apportioned: true }) },
    notMade: {},
    params: { share: 1 },
  },
  {
    code: 'slug-scale',
    severity: 'note',
    made: { values: rings({ origin: 'slug-test' }) },
    notMade: {},
    params: { share: 1 },
  },
  {
    code: 'stream-close',
    severity: 'caution',
    made: { context: { streams: [{ name: 'Linnet Brook', distance_m: 900 }, { name: 'Tarrow', distance_m: 410 }] } }, // prettier-ignore
    notMade: { context: { streams: [{ name: 'Tarrow', distance_m: 700 }] } },
    params: { stream: 'Tarrow', distance_m: 410 },
  },
  {
    code: 'unit-by-outline',
    severity: 'note',
    made: { context: { unit: { ...makeContext().unit, byOutlineOnly: true } } },
    notMade: {},
  },
  {
    code: 'values-left-out',
    severity: 'note',
    made: { values: [...rings(), { ...besideThePlace, composite: true }] },
    notMade: {},
    params: { count: 1 },
  },
  { code: 'model-outdated', severity: 'note', made: { context: { modelOutdated: true } }, notMade: {} },
]

const codesOf = (scene: Scene): NoteCode[] => look(scene).notes.map((note) => note.code)

describe.each(CASES)('note $code', ({ code, severity, made, notMade, params }) => {
  it('is made where it holds, with its severity and numbers', () => {
    const note = look(made).notes.find((n) => n.code === code)
    expect(note?.severity).toBe(severity)
    expect(note?.params).toMatchObject(params ?? {})
    for (const value of Object.values(note?.params ?? {})) expect(value).not.toBeNaN()
  })

  it('is not made where it does not hold', () => {
    expect(codesOf(notMade)).not.toContain(code)
  })
})

describe('confidence notes', () => {
  it('have a picture for every rule of the table', () => {
    expect(CASES.map((c) => c.code).sort()).toEqual(NOTE_RULES.map((rule) => rule.code).sort())
  })

  it('say only good things in a good place', () => {
    expect(
      new Set(look({ context: { crossValidation: makeCrossValidation(60, 57) } }).notes.map((n) => n.severity)),
    ).toEqual(new Set(['good']))
  })

  it('stay silent about tests when there is no estimate', () => {
    expect(codesOf({ place: { x: 25_000, y: 0 } })).toEqual(['outside-unit'])
  })

  it('know no edge in a unit without an outline', () => {
    const context = { unit: { ...makeContext().unit, outline: [] } }
    expect(codesOf({ context })).not.toContain('edge-near')
    expect(codesOf({ context })).not.toContain('outside-unit')
  })

  it('know a hole in the unit as outside', () => {
    const context = { unit: { ...makeContext().unit, outline: [square(20_000), square(500)] } }
    expect(codesOf({ context })).toEqual(['outside-unit'])
  })
})
