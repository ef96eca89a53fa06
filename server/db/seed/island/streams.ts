import type { Point } from './frame.ts'
import { distanceBetween, footOn, lineLength, pointAlong, smoothLine } from './lines.ts'
import { gradientNoise } from './noise.ts'
import { ISLAND_SEED } from './seed.ts'
import { inland } from './shape.ts'

export interface Stream {
  code: string
  name: string
  /** 2 for the river, 1 for brooks. */
  order: 1 | 2
  /** From the source to the mouth. */
  line: Point[]
  length: number
  /** Metres along the Tarrow where a brook joins it; null for the river and for brooks that reach the sea. */
  joinsAt: number | null
}

interface Course {
  code: string
  name: string
  /** Points in kilometres from the island's centre, source first. */
  through: readonly (readonly [number, number])[]
  joins: boolean
}

const TARROW: Course = {
  code: 'TAR',
  name: 'Tarrow',
  joins: false,
  through: [
    [-13.6, 9.4],
    [-11.6, 7.4],
    [-10.2, 5.4],
    [-8.2, 4.1],
    [-6.9, 2.2],
    [-4.8, 1.7],
    [-3.4, 0.1],
    [-1.3, -0.3],
    [0.4, -1.7],
    [1.5, -3.5],
    [3.7, -4.2],
    [5.6, -5.9],
    [8.1, -6.7],
    [10.1, -8.3],
    [12.4, -9.4],
    [14.2, -10.4],
  ],
}

const BROOKS: readonly Course[] = [
  {
    code: 'LIN',
    name: 'Linnet Brook',
    joins: true,
    through: [
      [1.9, 8.8],
      [0.6, 6.6],
      [-1.6, 5.0],
      [-3.2, 3.4],
      [-4.7, 1.8],
    ],
  },
  {
    code: 'OST',
    name: 'Ost Water',
    joins: true,
    through: [
      [-4.6, 11.0],
      [-5.9, 9.0],
      [-7.0, 7.2],
      [-8.4, 5.6],
      [-8.6, 4.4],
    ],
  },
  {
    code: 'HAR',
    name: 'Harl Water',
    joins: true,
    through: [
      [-15.2, 3.4],
      [-12.8, 3.5],
      [-10.6, 2.2],
      [-8.4, 2.6],
      [-6.9, 2.1],
    ],
  },
  {
    code: 'SAL',
    name: 'Sallow Brook',
    joins: true,
    through: [
      [-10.8, -3.2],
      [-8.6, -2.0],
      [-6.4, -1.6],
      [-4.6, -0.6],
      [-3.2, 0.1],
    ],
  },
  {
    code: 'KEL',
    name: 'Kelder Beck',
    joins: true,
    through: [
      [8.8, 5.2],
      [7.9, 2.9],
      [5.8, 1.0],
      [3.6, -0.4],
      [2.3, -2.2],
      [1.6, -3.4],
    ],
  },
  {
    code: 'MER',
    name: 'Merrin Brook',
    joins: true,
    through: [
      [-4.2, -8.4],
      [-2.9, -6.6],
      [-0.9, -5.7],
      [0.8, -4.4],
      [1.8, -3.8],
    ],
  },
  {
    code: 'PEL',
    name: 'Pell Brook',
    joins: true,
    through: [
      [14.6, -0.6],
      [12.4, -1.7],
      [9.9, -2.6],
      [8.2, -4.6],
      [7.4, -6.5],
    ],
  },
  {
    code: 'WEN',
    name: 'Wend Brook',
    joins: true,
    through: [
      [2.6, -10.4],
      [4.3, -9.2],
      [6.2, -8.6],
      [8.0, -7.6],
      [9.0, -7.3],
    ],
  },
  {
    code: 'COB',
    name: 'Cobble Burn',
    joins: false,
    through: [
      [-12.4, -2.2],
      [-14.6, -3.6],
      [-16.2, -5.6],
      [-17.6, -7.6],
      [-18.6, -9.6],
      [-20, -12],
    ],
  },
  {
    code: 'SAN',
    name: 'Sandry Burn',
    joins: false,
    through: [
      [7.6, 6.8],
      [6.2, 8.6],
      [5.2, 10.4],
      [4.1, 12.2],
      [3.4, 15],
    ],
  },
]

const sway = gradientNoise(ISLAND_SEED, 'streams/sway')

/** Bends a smooth course sideways: strongest in the middle, none at its ends, so that confluences stay in place. */
function meander(line: readonly Point[], amplitude: number, wavelength: number, row: number): Point[] {
  const length = lineLength(line)
  let along = 0
  return line.map((point, i) => {
    const before = line[Math.max(0, i - 1)]!
    const after = line[Math.min(line.length - 1, i + 1)]!
    along += distanceBetween(before, point)
    const heading = Math.atan2(after[1] - before[1], after[0] - before[0])
    const ends = Math.min(1, along / (2 * wavelength), Math.max(0, length - along) / (2 * wavelength))
    const aside = amplitude * ends * (sway(along / wavelength, row) + 0.5 * sway((along / wavelength) * 2.3, row + 50))
    return [point[0] - aside * Math.sin(heading), point[1] + aside * Math.cos(heading)]
  })
}

/** Cuts a line at the coast; a line that never leaves the land is kept whole. */
function untilSea(line: readonly Point[]): Point[] {
  const first = line.findIndex(([x, y]) => inland(x, y) <= 0)
  if (first < 1) return [...line]
  let land = line[first - 1]!
  let sea = line[first]!
  for (let k = 0; k < 30; k++) {
    const middle: Point = [(land[0] + sea[0]) / 2, (land[1] + sea[1]) / 2]
    if (inland(...middle) > 0) land = middle
    else sea = middle
  }
  return [...line.slice(0, first), land]
}

function course({ through }: Course, amplitude: number, row: number): Point[] {
  const metres = through.map(([x, y]): Point => [x * 1000, y * 1000])
  return untilSea(meander(smoothLine(metres, 24), amplitude, 900, row))
}

function drawRiver(): Stream {
  const line = course(TARROW, 260, 0)
  return { code: TARROW.code, name: TARROW.name, order: 2, line, length: lineLength(line), joinsAt: null }
}

function drawBrook(brook: Course, row: number, river: Stream): Stream {
  const drawn = course(brook, 150, row)
  const base = { code: brook.code, name: brook.name, order: 1 } as const
  if (!brook.joins) return { ...base, line: drawn, length: lineLength(drawn), joinsAt: null }
  // The brook ends where it first comes within reach of the river, on the river itself.
  const reach = drawn.findIndex((point) => footOn(river.line, point).distance < 120)
  const kept = reach > 0 ? drawn.slice(0, reach) : drawn
  const foot = footOn(river.line, kept[kept.length - 1]!)
  const joinsAt = Math.min(river.length, foot.along + 60)
  const line = [...kept, pointAlong(river.line, joinsAt)]
  return { ...base, line, length: lineLength(line), joinsAt }
}

/** The Tarrow and its brooks, river first. */
export const river: Stream = drawRiver()
export const brooks: readonly Stream[] = BROOKS.map((brook, i) => drawBrook(brook, i + 1, river))
export const streams: readonly Stream[] = [river, ...brooks]
