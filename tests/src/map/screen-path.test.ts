import { describe, expect, it } from 'vitest'
import { calmStretch, letterPlace } from '../../../src/components/map/label-path.ts'
import { distanceToPath, resample, visibleRuns, type ScreenPoint } from '../../../src/components/map/screen-path.ts'

const window = { left: 0, top: 0, right: 1000, bottom: 600 }
const line: ScreenPoint[] = [
  [50, 300],
  [950, 300],
]
const zigzag: ScreenPoint[] = Array.from({ length: 40 }, (_, i) => [50 + 20 * i, i % 2 === 0 ? 260 : 340])

describe('paths on the screen', () => {
  it('gives points at equal distances, also round corners', () => {
    const corner: ScreenPoint[] = [
      [0, 0],
      [10, 0],
      [10, 10],
    ]
    expect(resample(corner, 4).map(({ x, y }) => [x, y])).toEqual([
      [2, 0],
      [6, 0],
      [10, 0],
      [10, 4],
      [10, 8],
    ])
  })

  it('survives points that repeat', () => {
    expect(
      resample(
        [
          [0, 0],
          [0, 0],
          [8, 0],
        ],
        4,
      ),
    ).toHaveLength(2)
  })

  it('measures the distance to the nearest segment', () => {
    expect(distanceToPath([500, 310], line)).toBe(10)
    expect(distanceToPath([1000, 300], line)).toBe(50)
    expect(
      distanceToPath(
        [5, 5],
        [
          [0, 0],
          [0, 0],
        ],
      ),
    ).toBeCloseTo(Math.hypot(5, 5))
    expect(distanceToPath([5, 5], [[0, 0]])).toBe(Infinity)
  })
})

describe('a name along a path', () => {
  it('stands on the straight line near the middle of the window', () => {
    const stretch = calmStretch(line, 100, { window })!
    expect(stretch.every(({ y }) => Math.abs(y - 300) < 1e-9)).toBe(true)
    expect(Math.abs((stretch[0]!.x + stretch.at(-1)!.x) / 2 - 500)).toBeLessThan(25)
  })

  it('reads from left to right on a path that runs the other way', () => {
    const stretch = calmStretch([...line].reverse(), 100, { window })!
    expect(stretch.at(-1)!.x).toBeGreaterThan(stretch[0]!.x)
    expect(Math.cos(stretch[0]!.angle)).toBeCloseTo(1)
  })

  it('is left out where the path is nowhere calm, too short or outside', () => {
    expect(calmStretch(zigzag, 300, { window })).toBeNull()
    expect(
      calmStretch(
        [
          [50, 300],
          [80, 300],
        ],
        100,
        { window },
      ),
    ).toBeNull()
    expect(calmStretch(line, 100, { window: { left: 0, top: 0, right: 1000, bottom: 200 } })).toBeNull()
  })

  it('keeps away from a name that is written already', () => {
    const first = calmStretch(line, 100, { window })!
    const second = calmStretch(line, 100, { window, taken: first })!
    const gap = Math.min(...second.flatMap((a) => first.map((b) => Math.abs(a.x - b.x))))
    expect(gap).toBeGreaterThan(20)
  })

  it('puts a letter between two steps', () => {
    const stretch = calmStretch(line, 100, { window })!
    expect(letterPlace(stretch, 10).x - letterPlace(stretch, 4).x).toBeCloseTo(6)
    expect(letterPlace(stretch, 1e9)).toEqual(stretch.at(-1))
  })
})

describe('the visible parts of a path', () => {
  const box = { left: 0, top: 0, right: 100, bottom: 100 }

  it('are all of a path inside, and none of one outside', () => {
    const inside: ScreenPoint[] = [
      [10, 10],
      [90, 90],
    ]
    expect(visibleRuns(inside, box)).toEqual([inside])
    expect(
      visibleRuns(
        [
          [-20, 10],
          [-10, 90],
        ],
        box,
      ),
    ).toEqual([])
    expect(visibleRuns([[50, 50]], box)).toEqual([])
  })

  it('hold a segment that only crosses, and part where the path leaves', () => {
    expect(
      visibleRuns(
        [
          [-50, 50],
          [150, 60],
        ],
        box,
      ),
    ).toHaveLength(1)
    const out: ScreenPoint[] = [
      [50, 50],
      [150, 50],
      [150, 40],
      [50, 40],
    ]
    expect(visibleRuns(out, box)).toEqual([
      [
        [50, 50],
        [150, 50],
      ],
      [
        [150, 40],
        [50, 40],
      ],
    ])
  })
})
