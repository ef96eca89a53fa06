import { describe, expect, it } from 'vitest'
import { boxOf, type Box } from '#shared/charts/sketch-labels.ts'
import { testSketch, type SketchEdge } from '#shared/charts/test-sketch.ts'
import { sketchText } from '#shared/words/test-sketch.ts'
import { makeSeries } from '../hydraulics/make-inputs.ts'

const size = { width: 308, height: 216 }
const distance = (metres: number) => `${metres} m`
const pumped = makeSeries({ wellId: 'p', label: 'P', role: 'pumped', distance_m: 0, bearing_deg: null })
const at = (wellId: string, distance_m: number, bearing_deg: number | null) =>
  makeSeries({ wellId, label: wellId.toUpperCase(), distance_m, bearing_deg })
const makeEdge = (overrides: Partial<SketchEdge> = {}): SketchEdge => ({
  kind: 'recharge',
  name: 'Tarrow',
  distance_m: 80,
  bearing_deg: 270,
  chosen: true,
  ...overrides,
})
const sketchOf = (series = [pumped, at('a', 40, 90), at('b', 60, 0)], edges: SketchEdge[] = []) =>
  testSketch({ series }, edges, size, distance)

describe('The sketch of a test', () => {
  it('has north up and one scale for all distances', () => {
    const { wells, centre, metresPerPx } = sketchOf()
    const [p, a, b] = wells
    expect({ x: p!.x, y: p!.y }).toEqual(centre)
    expect([(a!.x - centre.x) * metresPerPx, a!.y - centre.y]).toEqual([expect.closeTo(40, 9), expect.closeTo(0, 9)])
    expect([b!.x - centre.x, (centre.y - b!.y) * metresPerPx]).toEqual([expect.closeTo(0, 9), expect.closeTo(60, 9)])
  })

  it('holds every well in its frame, however many and far', () => {
    const many = [pumped, ...Array.from({ length: 14 }, (_, i) => at(`w${i}`, 10 * 1.4 ** i, 47 * i))]
    for (const { x, y, label } of sketchOf(many).wells) {
      for (const [value, most] of [
        [x, size.width],
        [y, size.height],
        [label.y, size.height],
      ] as const) {
        expect(value).toBeGreaterThanOrEqual(0)
        expect(value).toBeLessThanOrEqual(most)
      }
    }
  })

  it('writes no label over another, or over a well', () => {
    const close = [pumped, at('a', 50, 10), at('b', 51, 12), at('c', 52, 14), at('d', 200, 180), at('e', 60, null)]
    const beside = [makeEdge({ distance_m: 45, bearing_deg: 15 }), makeEdge({ kind: 'barrier', distance_m: 4000 })]
    const { wells, rings, edges } = sketchOf(close, beside)
    const boxes = [...wells, ...rings, ...edges].map(({ label }) => boxOf(label))
    const apart = (one: Box, other: Box) =>
      one.right <= other.left || other.right <= one.left || one.bottom <= other.top || other.bottom <= one.top
    for (const [i, one] of boxes.entries()) {
      for (const other of boxes.slice(i + 1)) expect(apart(one, other)).toBe(true)
      for (const [k, { x, y }] of wells.entries())
        if (k !== i) expect(apart(one, { left: x, right: x, top: y, bottom: y })).toBe(true)
    }
  })

  it('draws a well whose direction is not known as a ring', () => {
    const { wells, rings, metresPerPx } = sketchOf([pumped, at('a', 40, 90), at('b', 30, null)])
    expect(wells.map(({ wellId }) => wellId)).toEqual(['p', 'a'])
    expect(rings.map(({ radius, label }) => [radius * metresPerPx, label.text])).toEqual([
      [expect.closeTo(30, 9), 'B, 30 m, direction not known'],
    ])
  })

  it('draws a near edge at its distance across its direction, and hatches barriers alone', () => {
    const { edges, centre, metresPerPx } = sketchOf(undefined, [makeEdge(), makeEdge({ kind: 'barrier' })])
    const x = Number(/^M([-\d.]+) /.exec(edges[0]!.path)![1])
    expect((centre.x - x) * metresPerPx).toBeCloseTo(80, 0)
    expect(edges.map(({ hatch, far }) => [hatch.length > 0, far])).toEqual([
      [false, false],
      [true, false],
    ])
  })

  it('keeps the wells apart where an edge is far, and marks that at the frame', () => {
    const near = sketchOf()
    const far = sketchOf(undefined, [makeEdge({ distance_m: 5000 })])
    expect(far.metresPerPx).toBe(near.metresPerPx)
    expect(far.edges[0]).toMatchObject({ far: true, label: { text: 'Tarrow, 5000 m' } })
  })

  it('is drawn for a single well', () => {
    const { wells, metresPerPx } = sketchOf([pumped])
    expect(wells).toHaveLength(1)
    expect(metresPerPx).toBeGreaterThan(0)
  })
})

describe('The sketch in words', () => {
  it('says where everything is', () => {
    const text = sketchText(
      { series: [pumped, at('a', 40, 90), at('b', 30, null)] },
      [makeEdge(), makeEdge({ kind: 'barrier', name: 'Pellow fault', bearing_deg: 45, chosen: false })],
      distance,
    )
    for (const part of [
      'north up, around the pumped well P.',
      'A stands 40 m to the east.',
      'B stands 30 m away in a direction that is not known.',
      'Tarrow, a stream of the analysis, lies 80 m to the west.',
      'Pellow fault, a barrier, lies 80 m to the north-east.',
    ])
      expect(text).toContain(part)
  })
})
