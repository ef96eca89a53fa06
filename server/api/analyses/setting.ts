import { createHash } from 'node:crypto'
import type { AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import { localStart } from '../pumping-tests/start-time.ts'
import type { PumpingTestRow, TestParts } from '../pumping-tests/view.ts'

/** What no method calculates with, and yet decides which values an accepted analysis stands for. */
export interface Setting {
  wellId: number
  /** In the test's own zone. */
  year: string
  intervalTopM: number | null
  intervalBottomM: number | null
  units: { unitId: number; share: number }[]
}

interface WholeTest {
  found: { test: PumpingTestRow }
  parts: Pick<TestParts, 'units'>
}

export function settingOf({ found: { test }, parts: { units } }: WholeTest): Setting {
  const { wellId, startAt, zone, intervalTopM, intervalBottomM } = test
  const shares = units.map(({ unitId, share }) => ({ unitId, share }))
  return { wellId, year: localStart(startAt, zone, 'year'), intervalTopM, intervalBottomM, units: shares }
}

/** The same for a test of a kind of its own: names of well and repeats change nothing either. */
export const sha256OfKind = (kind: string, inputs: object, setting: Setting): string =>
  createHash('sha256')
    .update(JSON.stringify([kind, inputs, setting], (key, value: unknown) => (key === 'label' ? undefined : value)))
    .digest('hex')

/**
 * Inputs and setting are written field by field in a fixed order, so their JSON text identifies them. The code of a
 * well is only its name: another one changes nothing.
 */
export function sha256Of({ series, ...inputs }: AnalysisInputs, setting: Setting): string {
  const nameless = series.map(({ label: _, ...rest }) => rest)
  return createHash('sha256')
    .update(JSON.stringify([inputs, nameless, setting]))
    .digest('hex')
}
