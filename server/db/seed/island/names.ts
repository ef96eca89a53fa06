import type { Point } from './frame.ts'
import { elevation } from './terrain.ts'

export interface NamedPlace {
  name: string
  at: Point
}

/** Names on the water. */
export const waters: readonly NamedPlace[] = [
  { name: 'Ansel Sound', at: [15_400, -12_400] },
  { name: 'Hallin Bay', at: [-21_600, 4_300] },
  { name: 'Sandry Bay', at: [3_400, 14_000] },
  { name: 'Fennick Haven', at: [-8_600, -14_600] },
]

const HILLS: readonly NamedPlace[] = [
  { name: 'Brannet Fell', at: [-2_400, 10_200] },
  { name: 'Tarrow Head', at: [-14_600, 9_200] },
  { name: 'Kelder Down', at: [10_200, 7_400] },
  { name: 'Pellow Rigg', at: [-10_400, -5_600] },
  { name: 'Fennick Edge', at: [-2_400, -9_800] },
  { name: 'Lan Hill', at: [15_400, -1_000] },
]

/** Walks uphill from a point, in steps that shrink from 200 m to 25 m. */
function summitNear(start: Point): Point {
  let at = start
  for (let step = 200; step >= 25; step /= 2) {
    for (let moved = true; moved;) {
      const [x, y] = at
      const around: Point[] = [
        [x + step, y],
        [x - step, y],
        [x, y + step],
        [x, y - step],
      ]
      const best = around.reduce((a, b) => (elevation(...b) > elevation(...a) ? b : a), at)
      moved = best !== at
      at = best
    }
  }
  return at
}

export interface Summit extends NamedPlace {
  /** Metres above the sea. */
  height: number
}

export const makeSummits = (): Summit[] =>
  HILLS.map(({ name, at }) => {
    const top = summitNear(at)
    return { name, at: top, height: elevation(...top) }
  })
