import type { Viewer } from '#shared/contracts/permissions.ts'
import type { VisibilityInput } from '#shared/contracts/visibility.ts'
import type { Executor } from '../../db/client.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, fieldError, notFound } from '../../errors.ts'
import type { createAdoptedValuesService } from '../adopted-values/adopted-values.service.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { isMoreVisible, testShowsHidden, type Exposure } from './exposure.ts'
import * as repository from './visibility.repository.ts'
import type { Subject } from './visibility.repository.ts'

interface Needs {
  adoptedValues: Pick<ReturnType<typeof createAdoptedValuesService>, 'changed' | 'unitsWithValues'>
}

export function createVisibilityService(deps: Deps, { adoptedValues }: Needs) {
  const { now } = deps

  /** A child is never more visible than its parent. */
  async function checkFamily(executor: Executor, subject: Subject, id: number, wanted: Exposure) {
    if (subject === 'pumping-test') {
      const parent = await repository.exposureOfParent(executor, id)
      const hasPrivateWells = (await repository.countPrivateWellsOf(executor, id)) > 0
      if (testShowsHidden(wanted, parent, hasPrivateWells))
        throw fieldError('visibility', 'pumping-test/more-visible-than-well')
      return
    }
    const tests = await repository.exposuresOfTests(executor, id)
    const observed = wanted.visibility === 'private' ? await repository.countOpenTestsWith(executor, id) : 0
    const count = Math.max(observed, tests.filter((test) => isMoreVisible(test, wanted)).length)
    if (count > 0) throw new AppError('visibility/tests-more-visible', { count })
  }

  return {
    /** Publishes, hides or embargoes a well or a test; estimates that used its values are made anew. */
    set: (viewer: Viewer, subject: Subject, id: number, { rowVersion, visibility, embargoUntil }: VisibilityInput) =>
      inTransaction(deps, async (tx) => {
        if (!(await repository.lockSubject(tx, viewer, subject, id))) throw notFound()
        const wanted = { visibility, embargoUntil: embargoUntil === null ? null : new Date(embargoUntil) }
        // It would hide the record until the daily job comes by, or publish it at once where a year was mistyped.
        if (wanted.embargoUntil && wanted.embargoUntil <= now())
          throw fieldError('embargoUntil', 'visibility/embargo-over')
        await checkFamily(tx, subject, id, wanted)
        const units = await adoptedValues.unitsWithValues(tx, subject, [id])
        if (visibility === 'private' && units.length > 0) throw new AppError('visibility/has-values')
        if (!(await repository.saveExposure(tx, subject, id, rowVersion, wanted))) throw new AppError('edit/conflict')
        await adoptedValues.changed(tx, units)
        const details = { visibility, embargoUntil }
        await recordAudit(tx, { viewer, at: now(), action: 'visibility/edit', subject, subjectId: id, details })
        return { visibility, embargoUntil, rowVersion: rowVersion + 1 }
      }),

    /** Ends embargoes whose time has come; the estimates of their units are made anew. */
    liftEmbargoes: () =>
      inTransaction(deps, async (tx) => {
        for (const subject of ['well', 'pumping-test'] as const) {
          const ids = await repository.liftEmbargoes(tx, subject, now())
          await adoptedValues.changed(tx, await adoptedValues.unitsWithValues(tx, subject, ids))
          for (const subjectId of ids) {
            await recordAudit(tx, { viewer: null, at: now(), action: 'visibility/lift-embargo', subject, subjectId })
          }
        }
      }),
  }
}
