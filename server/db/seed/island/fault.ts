import type { Point } from './frame.ts'
import { smoothLine } from './lines.ts'
import { fractalNoise } from './noise.ts'
import { ISLAND_SEED } from './seed.ts'
import type { UnitCode } from './units.ts'

const waver = fractalNoise(ISLAND_SEED, 'fault/waver', 6_000, 3)

/** Easting of the fault at a given northing: it runs from the south coast to the north coast. */
const faultX = (y: number) => 7_600 + 0.28 * y + 420 * waver(0, y)

export const fault: { code: string; name: string; kind: 'fault'; units: readonly UnitCode[]; line: Point[] } = {
  code: 'KF',
  name: 'Kelder Fault',
  kind: 'fault',
  units: ['FL', 'BS'],
  line: smoothLine(
    Array.from({ length: 17 }, (_, i): Point => [faultX(-13_500 + i * 1_750), -13_500 + i * 1_750]),
    2,
  ),
}

/** Which block of the confined units a place lies on. */
export const faultBlock = (x: number, y: number): 'west' | 'east' => (x < faultX(y) ? 'west' : 'east')
