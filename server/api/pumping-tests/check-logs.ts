import { fieldError } from '../../errors.ts'
import type { NewTestWell, listLoggedWells, PumpingTestRow } from './pumping-tests.repository.ts'

type LoggedWell = Awaited<ReturnType<typeof listLoggedWells>>[number]
type Start = Pick<PumpingTestRow, 'startAt' | 'zone'>

export interface KeptLogs {
  logged: LoggedWell[]
  /** Series from outside with clock times. */
  clockSeries: number
}

/**
 * Logs hold on to their test: their clock times, and those of series from outside, were read from its
 * start, and nothing else leads to those of a well.
 * @throws AppError on the field that would make readings wrong or lose them.
 */
export function checkLogs({ logged, clockSeries }: KeptLogs, before: Start, after: Start, wells: NewTestWell[]): void {
  const moved = after.startAt.getTime() !== before.startAt.getTime() || after.zone !== before.zone
  if (moved && logged.some(({ timeKind }) => timeKind === 'clock'))
    throw fieldError('startLocal', 'pumping-test/start-read')
  if (moved && clockSeries > 0) throw fieldError('startLocal', 'pumping-test/start-series')
  const lost = logged.find(({ wellId }) => !wells.some((well) => well.wellId === wellId))
  if (lost) throw fieldError(lost.role === 'pumped' ? 'wellId' : 'observationWells', 'pumping-test/well-has-readings')
}
