import type { Finding } from '../analysis.ts'
import { columnLength, GRAVITY, type Spring } from './damped-spring.ts'
import type { Heads, SlugInputs } from './slug-test.ts'

/** The measured length of the column should agree with that of the well to this share. Source: ASTM D5785. */
const LENGTH_SHARE = 0.2

/** Damping ζ between which the methods are meant. Source: ASTM D5785, D5881, D4104. */
export const DAMPING = { swinging: 0.2, creeping: 5 }

type Regime = 'swinging' | 'near-critical' | 'creeping'

const regimeOf = (damping: number): Regime => {
  if (damping < DAMPING.swinging) return 'swinging'
  return damping <= DAMPING.creeping ? 'near-critical' : 'creeping'
}

const codes: Record<Regime, string> = {
  swinging: 'damping-weak',
  'near-critical': 'damping-strong',
  creeping: 'damping-overdamped',
}

/** Whether the damping is one for which the method is meant, and which method to use if not. */
export function dampingFinding(meant: Regime, damping: number, { repeat }: Heads): Finding {
  const regime = regimeOf(damping)
  const params = { repeat: repeat.label, damping, low: DAMPING.swinging, high: DAMPING.creeping }
  return regime === meant
    ? { code: 'damping-fits', severity: 'good', params }
    : { code: codes[regime], severity: 'caution', params }
}

/** Frequency gives a length of the column that the well can be asked about. */
export function lengthFinding({ frequency_1_s }: Spring, inputs: SlugInputs, casingRadius_m: number): Finding {
  const measured_m = GRAVITY / frequency_1_s ** 2
  const built_m = columnLength(Math.max(0, inputs.screenTop_m), inputs.screenLength_m, { ...inputs, casingRadius_m })
  const share = Math.abs(measured_m / built_m - 1)
  const params = { measured_m, built_m, share, limit: LENGTH_SHARE }
  return share <= LENGTH_SHARE
    ? { code: 'column-agrees', severity: 'good', params }
    : { code: 'column-differs', severity: 'caution', params }
}

export const columnRule = {
  code: 'column-differs',
  statement: 'The frequency gives the length of the column to 20 %',
  source: 'ASTM D5785',
}

export const repeatRule = {
  code: 'depends-on-head',
  statement: 'K does not depend on the size of the slug',
  source: 'ASTM D4044',
}
