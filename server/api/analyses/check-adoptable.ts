import type { StoredResult } from '#shared/contracts/analysis-result.ts'
import { limitFindings } from '#shared/hydraulics/limits.ts'
import { defaultUnitSystemId, unitSystemById } from '#shared/quantities/systems.ts'
import { findingText } from '#shared/words/findings.ts'
import { AppError } from '../../errors.ts'

/** @throws AppError when there is no value, it is outside the limits, or an unusual one was not confirmed. */
export function checkAdoptable(result: Pick<StoredResult, 'T' | 'S' | 'storageClass'>, confirmed: string[]): void {
  if (!result.T) throw new AppError('analysis/no-transmissivity')
  const units = unitSystemById(defaultUnitSystemId)
  const limits = limitFindings({ T: result.T.value, S: result.S?.value ?? null, storageClass: result.storageClass })
  const refused = limits.find(({ severity }) => severity === 'bad')
  if (refused) throw new AppError('analysis/outside-limits', { reason: findingText(refused, units) })
  const open = limits.find(({ code }) => !confirmed.includes(code))
  if (open) throw new AppError('analysis/confirmation-needed', { reason: findingText(open, units), code: open.code })
}
