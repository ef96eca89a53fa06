/** G(L/b), lowest power first. Source: Brons & Marting 1961, as fitted by Bradbury & Rothschild 1985. */
const COEFFICIENTS = [2.948, -7.363, 11.447, -4.675]

/**
 * Extra drawdown of a well open to a part L of the thickness b, as s_p in s = Q/(4πT)·(W + 2 s_p):
 * (b/L − 1)·(ln(b/r_w) − G(L/b)); 0 for full penetration, and not below it.
 * @throws RangeError when the open part is not within the aquifer
 */
export function penetrationLoss(screenLength_m: number, thickness_m: number, wellRadius_m: number): number {
  const ratio = screenLength_m / thickness_m
  if (!(ratio > 0 && ratio <= 1)) throw new RangeError(`The well is open to ${ratio} of the aquifer`)
  const shape = COEFFICIENTS.reduceRight((sum, coefficient) => sum * ratio + coefficient, 0)
  return Math.max(0, ((1 - ratio) / ratio) * (Math.log(thickness_m / wellRadius_m) - shape))
}
