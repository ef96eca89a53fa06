import { draws } from '../random.ts'

export type Noise = (x: number, y: number) => number

const SIZE = 256

function permutation(seed: number, subject: string): Uint8Array {
  const { whole } = draws(seed, `noise/${subject}`)
  const order = Uint8Array.from({ length: SIZE }, (_, i) => i)
  for (let i = SIZE - 1; i > 0; i--) {
    const j = whole(0, i)
    const kept = order[i]!
    order[i] = order[j]!
    order[j] = kept
  }
  return order
}

const fade = (t: number) => t * t * t * (t * (t * 6 - 15) + 10)
const mix = (a: number, b: number, t: number) => a + (b - a) * t

/** Gradient noise (Perlin 2002) of unit wavelength, about −1 to 1, repeating after 256 wavelengths. */
export function gradientNoise(seed: number, subject: string): Noise {
  const order = permutation(seed, subject)
  const gradientX = Float64Array.from({ length: SIZE }, (_, i) => 1.5 * Math.cos((2 * Math.PI * i) / SIZE))
  const gradientY = Float64Array.from({ length: SIZE }, (_, i) => 1.5 * Math.sin((2 * Math.PI * i) / SIZE))
  const corner = (i: number, j: number, dx: number, dy: number) => {
    const k = order[(order[i & 255]! + j) & 255]!
    return gradientX[k]! * dx + gradientY[k]! * dy
  }
  return (x, y) => {
    const i = Math.floor(x)
    const j = Math.floor(y)
    const dx = x - i
    const dy = y - j
    const u = fade(dx)
    const south = mix(corner(i, j, dx, dy), corner(i + 1, j, dx - 1, dy), u)
    const north = mix(corner(i, j + 1, dx, dy - 1), corner(i + 1, j + 1, dx - 1, dy - 1), u)
    return mix(south, north, fade(dy))
  }
}

/** Octaves of gradient noise, each half as wide and half as high as the one before; `wavelength` in metres. */
export function fractalNoise(seed: number, subject: string, wavelength: number, octaves: number): Noise {
  const layers = Array.from({ length: octaves }, (_, k) => gradientNoise(seed, `${subject}/${k}`))
  return (x, y) => {
    let sum = 0
    let scale = 1
    for (const layer of layers) {
      sum += layer((x / wavelength) * scale, (y / wavelength) * scale) / scale
      scale *= 2
    }
    return sum
  }
}
