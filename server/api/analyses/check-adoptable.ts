import type { StoredResult } from '#shared/contracts/analysis-result.ts'
import { kindOfMethod, type KindId } from '#shared/hydraulics/any-kind.ts'
import { limitFindings } from '#shared/hydraulics/limits.ts'
import { defaultUnitSystemId, unitSystemById } from '#shared/quantities/systems.ts'
import { findingText } from '#shared/words/findings.ts'
import { AppError } from '../../errors.ts'

type Adoptable = Pick<StoredResult, 'T' | 'S' | 'K' | 'storageClass' | 'others'>

/** What a reviewer can accept of an analysis, by the kind of its test, and what is missing otherwise. */
const demands: Record<
  KindId,
  { holds: (result: Adoptable) => boolean; otherwise: 'analysis/no-transmissivity' | 'analysis/nothing-found' }
> = {
  'constant-rate': { holds: ({ T }) => T !== null, otherwise: 'analysis/no-transmissivity' },
  'specific-capacity': { holds: ({ T }) => T !== null, otherwise: 'analysis/no-transmissivity' },
  slug: { holds: ({ K }) => K !== null, otherwise: 'analysis/nothing-found' },
  // The losses of a well are kept with it; they are no value of the aquifer.
  step: { holds: ({ others }) => (others ?? []).length > 0, otherwise: 'analysis/nothing-found' },
}

/** @throws AppError when there is no value, it is outside the limits, or an unusual one was not confirmed. */
export function checkAdoptable(result: Adoptable & Pick<StoredResult, 'method'>, confirmed: string[]): void {
  const { holds, otherwise } = demands[kindOfMethod(result.method)]
  if (!holds(result)) throw new AppError(otherwise)
  const units = unitSystemById(defaultUnitSystemId)
  const limits = limitFindings({
    T: result.T?.value ?? null,
    S: result.S?.value ?? null,
    storageClass: result.storageClass,
  })
  const refused = limits.find(({ severity }) => severity === 'bad')
  if (refused) throw new AppError('analysis/outside-limits', { reason: findingText(refused, units) })
  const open = limits.find(({ code }) => !confirmed.includes(code))
  if (open) throw new AppError('analysis/confirmation-needed', { reason: findingText(open, units), code: open.code })
}
