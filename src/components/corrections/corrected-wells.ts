import type { KindWorkbenchInputs, WorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { CorrectedWell } from '#shared/charts/corrections-plot.ts'
import type { AppliedCorrection } from '#shared/hydraulics/corrections/correction.ts'

/** Slugs are over before the weather changes, and a specific capacity has no log. */
export const isCorrectable = (kind: PumpingTest['kind']) => kind === 'constant-rate' || kind === 'step'

export interface WellWithCorrections extends CorrectedWell {
  wellId: string
  corrections: readonly AppliedCorrection[]
}

const seriesOf = ({ inputs }: WorkbenchInputs | KindWorkbenchInputs) =>
  'series' in inputs ? inputs.series : 'well' in inputs ? [inputs.well] : []
const hasReadings = ({ elapsed_s }: { elapsed_s: readonly number[] }) => elapsed_s.length > 0

/** Wells with readings, with what was taken off them. */
export const correctedWells = (snapshot: WorkbenchInputs | KindWorkbenchInputs): WellWithCorrections[] =>
  seriesOf(snapshot)
    .filter(hasReadings)
    .map(({ wellId, label, elapsed_s, drawdown_m, included, corrections = [] }) => ({
      wellId,
      label,
      elapsed_s,
      drawdown_m,
      included,
      corrections,
      uncorrected_m: snapshot.readings.find((one) => one.wellId === wellId)?.uncorrected_m ?? null,
    }))
