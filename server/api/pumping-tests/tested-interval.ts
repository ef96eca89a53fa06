import type { PumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import { fieldError } from '../../errors.ts'
import type { WellForTest } from './test-wells.ts'

export interface Screen {
  topM: number
  bottomM: number
  validFrom: Date | null
  validTo: Date | null
}

export interface Interval {
  intervalTopM: number | null
  intervalBottomM: number | null
}

/** Whether a screen was open at a moment. */
export const openAt = (at: Date) => (screen: Screen) =>
  (screen.validFrom === null || screen.validFrom <= at) && (screen.validTo === null || screen.validTo > at)

/**
 * The tested interval, depths below ground in metres, frozen at the test's date.
 * @throws AppError on the interval's field when it is missing, upside down, or deeper than the well.
 */
export function testedInterval(input: PumpingTestInput, well: WellForTest, screens: Screen[], at: Date): Interval {
  if (input.intervalBasis === 'unknown') return { intervalTopM: null, intervalBottomM: null }
  if (input.intervalBasis === 'screens') return fromScreens(well, screens.filter(openAt(at)))
  const { intervalTopM: top, intervalBottomM: bottom } = input
  if (top === null || bottom === null) throw fieldError('intervalTopM', 'pumping-test/interval-needed')
  if (bottom <= top) throw fieldError('intervalBottomM', 'pumping-test/interval-order')
  if (well.depthM !== null && bottom > well.depthM + 0.5) {
    throw fieldError('intervalBottomM', 'pumping-test/interval-too-deep', { bottom, depth: well.depthM })
  }
  return { intervalTopM: top, intervalBottomM: bottom }
}

function fromScreens(well: WellForTest, open: Screen[]): Interval {
  if (open.length === 0) throw fieldError('intervalBasis', 'pumping-test/no-screens', { code: well.code })
  return {
    intervalTopM: Math.min(...open.map(({ topM }) => topM)),
    intervalBottomM: Math.max(...open.map(({ bottomM }) => bottomM)),
  }
}
