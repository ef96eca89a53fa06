import type { PenetrationErrorCode } from '#shared/hydraulics/penetration-errors.ts'
import type { Sentences } from './findings.ts'

/** Findings of the solutions with leakage or partial penetration. */
export const leakageFindings: Sentences<string> = {
  'leakage-not-shown': ({ number, percent }) =>
    `Leakage changes the last drawdown by ${percent('share')} only (r/B ${number('ratio')}), less than ${percent('limit')}: a drift of rate or level would look the same. Take the leakage factor as a lower limit, and compare with the confined curve.`,
  leakance: ({ number, percent }) =>
    `Leakage takes ${percent('share')} off the last drawdown (r/B ${number('ratio')}); the aquitard's K'/b' is ${number('leakance_per_s')} per second.`,
  'leakage-steady': () =>
    'The readings reach the steady state, so that leakage is told from the flat part of the curve.',
  'aquitard-storage-not-shown': ({ number, percent }) =>
    `Water from the aquitard changes the last drawdown by ${percent('share')} only (β ${number('beta')}), less than ${percent('limit')}: a drift of rate or level would look the same. Compare with the confined curve.`,
  'aquitard-early-time': ({ number, span }) =>
    `The solution holds while the far side of the aquitard is not felt, before S'b'/(10K'). Whether that covers readings up to ${span('last_s')} cannot be told from pumping alone; its product K'S'/b' is ${number('product_per_s')} per second.`,
  'penetration-matters': ({ percent, number }) =>
    `Partial penetration makes ${percent('share')} of the last drawdown (Kz/Kr ${number('anisotropy')}).`,
  'penetration-not-shown': ({ percent, number }) =>
    `Partial penetration changes no drawdown by more than ${percent('share')} (Kz/Kr ${number('anisotropy')}): the wells are far enough away, and the readings say nothing of anisotropy. Use the confined curve.`,
}

/** Refusals of solutions that look at the wells' screens. */
export const penetrationRefusals: Sentences<PenetrationErrorCode> = {
  'analysis/penetration-thickness': () =>
    'Partial penetration needs the thickness of the aquifer. Enter it, or use the confined curve.',
  'analysis/penetration-screens': () =>
    'No well of this test has a screen that is known to be shorter than the aquifer. Enter the screens, or use the confined curve.',
  'analysis/screen-outside': ({ length }) =>
    `A screen from ${length('top_m')} to ${length('bottom_m')} below the aquifer's top lies outside the aquifer, which is ${length('thickness_m')} thick. Correct the screen or the thickness.`,
}
