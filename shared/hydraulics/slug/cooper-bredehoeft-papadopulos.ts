import { complex, over, plus, scaled, squared, times, writeComplex } from '#shared/numerics/complex.ts'
import { laplaceInverse, type LaplaceTransform } from '#shared/numerics/laplace-inversion.ts'
import { wellFace } from '../well-face.ts'

/** Head left in a well after a slug, as a share of the first, and its derivatives by ln T and ln S. */
export interface SlugResponse {
  share: number
  byLogT: number
  byLogS: number
}

const out = new Float64Array(3)

/**
 * H/H0 = F(α, β) after an instantaneous slug in a fully penetrating well of finite diameter in a confined aquifer,
 * with α = r_w²S/r_c² and β = Tt/r_c². Relative error ≤ 1e-6 (see the tests).
 * @param wellRadius_m radius of the open hole or screen
 * @param casingRadius_m radius of the casing in which the level moves
 * @throws RangeError unless all arguments are positive
 * Source: Cooper, Bredehoeft & Papadopulos 1967; ASTM D4104.
 */
export function slugResponse(
  T_m2_s: number,
  S: number,
  wellRadius_m: number,
  casingRadius_m: number,
  time_s: number,
): number {
  return slugResponseWithDerivatives(T_m2_s, S, wellRadius_m, casingRadius_m, time_s).share
}

/** The same with its derivatives. @throws RangeError unless all arguments are positive */
export function slugResponseWithDerivatives(
  T_m2_s: number,
  S: number,
  wellRadius_m: number,
  casingRadius_m: number,
  time_s: number,
): SlugResponse {
  laplaceInverse(slugTransform(T_m2_s, S, wellRadius_m, casingRadius_m), 3, checked(time_s), out)
  return { share: out[0] as number, byLogT: out[1] as number, byLogS: out[2] as number }
}

/** F(α, β) itself. @throws RangeError unless both are positive */
export const slugFunction = (alpha: number, beta: number): number => slugResponse(1, alpha, 1, 1, beta)

/**
 * cG/(1 + cpG) with c = r_c²/(2T): what the well gives up, r_c²·dH/dt, flows into the aquifer. With derivatives by
 * ln T and ln S.
 */
export function slugTransform(T: number, S: number, wellRadius_m: number, casingRadius_m: number): LaplaceTransform {
  ;[T, S, wellRadius_m, casingRadius_m].forEach(checked)
  const c = casingRadius_m ** 2 / (2 * T)
  return (re, im, values) => {
    const p = complex(re, im)
    const { G, slope } = wellFace(p, T, S, wellRadius_m)
    const whole = plus(complex(1), scaled(c, times(p, G)))
    const perG = over(complex(c), squared(whole))
    const byLogS = scaled(0.5, times(perG, slope))
    const byLogC = times(perG, G)
    writeComplex([over(scaled(c, G), whole), scaled(-1, plus(byLogC, byLogS)), byLogS], values)
  }
}

function checked(value: number): number {
  if (!(value > 0) || !Number.isFinite(value)) throw new RangeError(`A slug test needs positive values, not ${value}`)
  return value
}
