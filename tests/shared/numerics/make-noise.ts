import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus'
import { normalQuantile } from '#shared/numerics/normal.ts'

/** Normal noise of standard deviation 1; with `phi` a stationary first-order autoregression. Same seed, same noise. */
export function makeNoise(seed: number, count: number, { phi = 0 } = {}): number[] {
  const generator = xoroshiro128plus(seed)
  const draw = () => normalQuantile(((generator.next() >>> 0) + 0.5) / 2 ** 32)
  // Neighbouring seeds begin alike; the first draws are thrown away.
  for (let i = 0; i < 50; i++) draw()
  let value = draw()
  return Array.from({ length: count }, (_, i) =>
    i === 0 ? value : (value = phi * value + Math.sqrt(1 - phi * phi) * draw()),
  )
}
