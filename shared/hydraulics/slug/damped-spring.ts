/** Standard gravity, m/s². */
export const GRAVITY = 9.80665
/** Nearer to critical damping than this both forms lose digits; the limit is used. */
const CRITICAL = 1e-8

/**
 * A column of water that swings: ω0 = √(g/L) of the undamped column of effective length L, and damping ζ, 1 where it
 * just no longer swings.
 */
export interface Spring {
  frequency_1_s: number
  damping: number
}

/**
 * Displacement of a damped spring at times τ = ω0·t: e^-ζτ·[start·C(τ) + (velocity + ζ·start)·D(τ)], with C and D the
 * cosine and sine of the swing, or their hyperbolic counterparts where ζ > 1.
 * @param start displacement at time zero; `velocity` its derivative by τ there
 * Source: van der Kamp 1976; Kipp 1985.
 */
export function springDisplacement(
  { frequency_1_s, damping }: Spring,
  time_s: number,
  start = 1,
  velocity = 0,
): number {
  const tau = frequency_1_s * time_s
  const [cosine, sine] = damping < 1 ? swinging(damping, tau) : creeping(damping, tau)
  return start * cosine + (velocity + damping * start) * sine
}

function swinging(damping: number, tau: number): [number, number] {
  const rate = Math.sqrt((1 - damping) * (1 + damping))
  const fading = Math.exp(-damping * tau)
  return rate < CRITICAL
    ? [fading, fading * tau]
    : [fading * Math.cos(rate * tau), (fading * Math.sin(rate * tau)) / rate]
}

function creeping(damping: number, tau: number): [number, number] {
  const rate = Math.sqrt((damping - 1) * (damping + 1))
  // Written with two falling exponentials, so that neither overflows; (ζ − rate) = 1/(ζ + rate).
  const slow = Math.exp(-tau / (damping + rate))
  if (rate < CRITICAL) return [slow, slow * tau]
  const drop = -Math.expm1(-2 * rate * tau)
  return [(slow * (2 - drop)) / 2, (slow * drop) / (2 * rate)]
}

/** Length of the column that swings: that above the screen, and the water in the screen at its own radius. */
export function columnLength(
  aboveScreen_m: number,
  screenLength_m: number,
  { casingRadius_m, screenRadius_m }: { casingRadius_m: number; screenRadius_m: number },
): number {
  // Half of the screen's length takes part, its flow falling evenly to nothing. Source: Kipp 1985; ASTM D5785.
  return aboveScreen_m + (casingRadius_m ** 2 / screenRadius_m ** 2) * (screenLength_m / 2)
}

const MOST_ROUNDS = 500
const TOLERANCE = 1e-13

export interface SpringWell {
  casingRadius_m: number
  screenRadius_m: number
  storativity: number
}

/**
 * T from frequency and damping: T = a·ln(T/(k·r_s²·S·ω0)), a = r_c²·ω0/(8ζ), by iteration from above.
 * @param constant k: 0.79 after van der Kamp 1976 (ASTM D5785), 1 after Kipp 1985 without skin (ASTM D5881)
 * @returns null where no T fits: the damping is too strong for the column and the storativity assumed
 */
export function springTransmissivity(
  { frequency_1_s, damping }: Spring,
  { casingRadius_m, screenRadius_m, storativity }: SpringWell,
  constant: number,
): { T: number; a: number; iterations: number } | null {
  const a = (casingRadius_m ** 2 * frequency_1_s) / (8 * damping)
  const scale = constant * screenRadius_m ** 2 * storativity * frequency_1_s
  // a·ln(T/scale) is concave: of its two fixed points the upper, where T > a, is the one that repeats itself.
  let T = a * Math.max(2, 2 * Math.log(a / scale))
  for (let iterations = 1; iterations <= MOST_ROUNDS; iterations++) {
    const next = a * Math.log(T / scale)
    if (!(next > a)) return null
    if (Math.abs(next - T) <= TOLERANCE * T) return { T: next, a, iterations }
    T = next
  }
  return null
}

/** Damping of a column of frequency ω0 by an aquifer: r_c²·ω0/(8T)·ln(T/(k·r_s²·S·ω0)), the same the other way round. */
export function springDamping(
  T: number,
  frequency_1_s: number,
  { casingRadius_m, screenRadius_m, storativity }: SpringWell,
  constant: number,
): number {
  const argument = T / (constant * screenRadius_m ** 2 * storativity * frequency_1_s)
  return ((casingRadius_m ** 2 * frequency_1_s) / (8 * T)) * Math.log(argument)
}
