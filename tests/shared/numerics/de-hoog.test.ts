import { describe, expect, it } from 'vitest'
import { complex, over, plus, scaled, squareRoot, times, type Complex } from '#shared/numerics/complex.ts'
import { deHoogInverse } from '#shared/numerics/de-hoog.ts'

const one = complex(1)
const at = [0.01, 0.3, 1, 2.7, 8, 20]

describe('inversion by de Hoog, Knight & Stokes', () => {
  it('gives back e^-t, 1 and t within 1e-7', () => {
    const pairs: [(p: Complex) => Complex, (t: number) => number][] = [
      [(p) => over(one, plus(p, one)), (t) => Math.exp(-t)],
      [(p) => over(one, p), () => 1],
      [(p) => over(one, times(p, p)), (t) => t],
    ]
    for (const [transform, original] of pairs)
      deHoogInverse(transform, at).forEach((value, i) =>
        expect(Math.abs(value - original(at[i] as number))).toBeLessThan(1e-7 * Math.max(1, at[i] as number)),
      )
  })

  it('follows swings, whose poles are far from the negative axis', () => {
    const transform = (p: Complex) => over(one, plus(times(p, p), plus(scaled(0.4, p), complex(1.04))))
    deHoogInverse(transform, at).forEach((value, i) => {
      const t = at[i] as number
      expect(Math.abs(value - Math.exp(-0.2 * t) * Math.sin(t))).toBeLessThan(1e-7)
    })
  })

  it('has the closed form of e^-√p at times when it matters: a/(2√(πt³))·e^(-1/4t)', () => {
    const transform = (p: Complex) => {
      const root = squareRoot(p)
      const size = Math.exp(-root.re)
      return complex(size * Math.cos(root.im), -size * Math.sin(root.im))
    }
    const late = [0.3, 1, 2.7, 8, 20]
    deHoogInverse(transform, late).forEach((value, i) => {
      const t = late[i] as number
      expect(Math.abs(value - Math.exp(-1 / (4 * t)) / (2 * Math.sqrt(Math.PI * t ** 3)))).toBeLessThan(1e-8)
    })
  })

  it('does not depend on which times are asked for together', () => {
    const transform = (p: Complex) => over(one, plus(p, one))
    const [alone] = deHoogInverse(transform, [1.7])
    expect(deHoogInverse(transform, [1.9, 1.7, 0.1])[1]).toBe(alone)
  })
})
