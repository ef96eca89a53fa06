import { complex, over, plus, scaled, times, type Complex } from '#shared/numerics/complex.ts'
import { deHoogInverse } from '#shared/numerics/de-hoog.ts'
import { wellFace } from '../well-face.ts'
import { GRAVITY } from './damped-spring.ts'

export interface InertialWell {
  T: number
  S: number
  screenRadius_m: number
  casingRadius_m: number
  /** Effective length of the column of water that moves. */
  column_m: number
}

/**
 * H/H0 of a column released from rest in a well open to a confined aquifer that stores water: between swinging and
 * creeping no simpler formula holds. Without inertia (column 0) it is the response of a well with storage alone.
 * Source: Kipp 1985; ASTM D5881.
 */
export function inertialHeads({ T, S, screenRadius_m, casingRadius_m, column_m }: InertialWell, times_s: number[]) {
  const c = casingRadius_m ** 2 / (2 * T)
  const inertia = column_m / GRAVITY
  const transform = (p: Complex) => {
    const top = plus(scaled(inertia, p), scaled(c, wellFace(p, T, S, screenRadius_m).G))
    return over(top, plus(complex(1), times(p, top)))
  }
  return deHoogInverse(transform, times_s)
}
