import type { Point } from './frame.ts'

export interface Settlement {
  name: string
  at: Point
  kind: 'town' | 'village' | 'hamlet'
  /** Radius of the built-up ground in metres. */
  radius: number
}

const RADIUS = { town: 900, village: 480, hamlet: 240 } as const

const settlement = (name: string, kind: Settlement['kind'], east: number, north: number): Settlement => ({
  name,
  kind,
  at: [east, north],
  radius: RADIUS[kind],
})

export const settlements: readonly Settlement[] = [
  settlement('Port Ansel', 'town', 11_300, -8_000),
  settlement('Orrick Cross', 'town', -5_600, -0.2e3),
  settlement('Kelderth', 'village', 9_800, 3_000),
  settlement('Upper Tarrow', 'village', -10_000, 6_900),
  settlement('Fennick', 'village', -4_400, -6_600),
  settlement('Brannet', 'village', -1_300, 8_300),
  settlement('Hallin Bay', 'village', -18_300, 1_900),
  settlement('Pellow Green', 'hamlet', -12_900, -6_600),
  settlement('Lanmere', 'hamlet', 16_900, 1_900),
  settlement('Sandry', 'hamlet', 6_600, 11_600),
]
