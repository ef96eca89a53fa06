/** A pumped well with one drawdown at one time, all in SI. */
export interface SpecificCapacityInputs {
  version: 1
  wellId: string
  label: string
  rate_m3_s: number
  /** Relative standard deviation of the rate. */
  rateError: number
  drawdown_m: number
  /** Standard deviation of the drawdown. */
  drawdownSd_m: number
  /** Time since pumping began. */
  duration_s: number
  wellRadius_m: number
  /** Inner radius of the casing in which the level moves; null: not known. */
  casingRadius_m: number | null
  aquifer: 'confined' | 'leaky' | 'unconfined'
  /** Saturated thickness; null: not known, and then no correction for partial penetration is made. */
  thickness_m: number | null
  /** Relative standard deviation of the thickness. */
  thicknessError: number
  /** Open length of the well; null: all of the aquifer. */
  screenLength_m: number | null
}

/** What has to be assumed, with how sure it is. */
export interface SpecificCapacityOptions {
  /** Storativity, and the standard deviation of its log10. Default by the kind of aquifer, see `assumedStorage`. */
  storativity?: number | null
  storativityLogSd?: number | null
  /** Well loss C of s = CQ², s²/m⁵, with its standard deviation. Default 0: none known. */
  wellLoss_s2_m5?: number
  wellLossSd_s2_m5?: number
  /** Replace s by s − s²/2b in an unconfined aquifer. Default false. */
  thinning?: boolean
}
