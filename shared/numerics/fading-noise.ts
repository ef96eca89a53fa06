/** Residuals of one series in order, with the derivatives of the model, row by row. */
export interface ResidualSeries {
  residuals: ArrayLike<number>
  /** residuals.length × unknowns, row by row. */
  jacobian: ArrayLike<number>
  /** Ascending positions on each axis along which residuals may be alike, for example time and ln time. */
  axes: ArrayLike<number>[]
}

/** How residuals are alike: a share of their variance that fades with distance along an axis, the rest white. */
export interface FadingNoise {
  axis: number
  /** Distance over which likeness falls to 1/e. */
  reach: number
  share: number
}

export const WHITE: FadingNoise = { axis: 0, reach: 1, share: 0 }

/** Sums over all series for a noise with correlation matrix R: r'R⁻¹r, J'R⁻¹r, J'R⁻¹J, J'RJ and ln|R|. */
export interface NoiseSums {
  squares: number
  projected: number[]
  whitened: number[][]
  spread: number[][]
  logDeterminant: number
}

export function noiseSums(series: ResidualSeries[], size: number, noise: FadingNoise): NoiseSums {
  const square = () => Array.from({ length: size }, () => new Array<number>(size).fill(0))
  const sums: NoiseSums = {
    squares: 0,
    projected: new Array<number>(size).fill(0),
    whitened: square(),
    spread: square(),
    logDeterminant: 0,
  }
  for (const one of series) {
    const fades = fadesOf(one, noise)
    addWhitened(one, size, noise.share, fades, sums)
    addSpread(one, size, noise.share, fades, sums)
  }
  return sums
}

/** Likeness of each residual with the one before it; none for the first. */
function fadesOf({ residuals, axes }: ResidualSeries, { axis, reach, share }: FadingNoise): Float64Array {
  const fades = new Float64Array(residuals.length)
  const position = axes[axis]
  if (share === 0 || !position) return fades
  for (let i = 1; i < fades.length; i++) {
    fades[i] = Math.exp(((position[i - 1] as number) - (position[i] as number)) / reach)
  }
  return fades
}

/**
 * Whitens residuals and derivatives by the Kalman filter of the process, which costs one pass where R⁻¹ would cost n³.
 * Source: Jones 1981 (unequally spaced series).
 */
function addWhitened(
  { residuals, jacobian }: ResidualSeries,
  size: number,
  share: number,
  fades: Float64Array,
  sums: NoiseSums,
): void {
  const state = new Float64Array(size + 1)
  const innovation = new Float64Array(size + 1)
  let variance = share
  for (let i = 0; i < fades.length; i++) {
    const fade = fades[i] as number
    variance = fade * fade * variance + (1 - fade * fade) * share
    // Readings at one moment, or nearly so, would otherwise divide by zero.
    const total = Math.max(variance + 1 - share, 1e-12)
    const gain = variance / total
    const scale = 1 / Math.sqrt(total)
    for (let c = 0; c <= size; c++) {
      const value = c === 0 ? (residuals[i] as number) : (jacobian[i * size + c - 1] as number)
      const surprise = value - fade * (state[c] as number)
      innovation[c] = surprise * scale
      state[c] = value - (1 - gain) * surprise
    }
    variance -= gain * variance
    sums.logDeterminant += Math.log(total)
    addProducts(innovation, sums)
  }
}

function addProducts(innovation: Float64Array, sums: NoiseSums): void {
  const first = innovation[0] as number
  sums.squares += first * first
  for (let j = 0; j < sums.projected.length; j++) {
    const derivative = innovation[j + 1] as number
    const row = sums.whitened[j] as number[]
    sums.projected[j] = (sums.projected[j] as number) + derivative * first
    for (let k = 0; k < row.length; k++) row[k] = (row[k] as number) + derivative * (innovation[k + 1] as number)
  }
}

/** Adds J'RJ; what fades is carried forward by one factor per step. */
function addSpread(
  { jacobian }: ResidualSeries,
  size: number,
  share: number,
  fades: Float64Array,
  { spread }: NoiseSums,
): void {
  const carried = new Float64Array(size)
  for (let i = 0; i < fades.length; i++) {
    for (let j = 0; j < size; j++) {
      const before = i > 0 ? (jacobian[(i - 1) * size + j] as number) : 0
      carried[j] = (fades[i] as number) * ((carried[j] as number) + before)
    }
    for (let j = 0; j < size; j++) {
      const a = jacobian[i * size + j] as number
      const row = spread[j] as number[]
      for (let k = 0; k < size; k++) {
        const b = jacobian[i * size + k] as number
        row[k] = (row[k] as number) + a * b + share * (a * (carried[k] as number) + b * (carried[j] as number))
      }
    }
  }
}
