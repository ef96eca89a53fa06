import { createHash } from 'node:crypto'
import { estimateQuantity, type EstimateQuantity } from '#shared/contracts/estimates.ts'
import type { UnitModel } from '#shared/estimates/types.ts'
import type { Scope } from '../../db/readable.ts'
import type { Deps } from '../../deps.ts'
import { AppError } from '../../errors.ts'
import type { FitModelInput } from '../../jobs/tasks/fit-model.ts'
import type { EstimatesNeeds } from './estimates.service.ts'
import * as repository from './estimates.repository.ts'
import { loadUnitData, type UnitData } from './unit-data.ts'

type Newest = NonNullable<Awaited<ReturnType<typeof repository.newestModel>>>

const scopes: Scope[] = ['published', 'internal']
/** A model is known by what it was fitted to: a change that its scope cannot see leaves it as it is. */
const fingerprintOf = ({ siteValues, barriers }: UnitData): string =>
  createHash('sha256').update(JSON.stringify({ siteValues, barriers })).digest('hex')

/** Units times quantities times scopes of a large region; the oldest go first. */
const mostKept = 64

/** Values and fitted models per unit, quantity, scope and data version; what is kept here can be lost at any time. */
export function createModels(deps: Deps, adoptedValues: EstimatesNeeds['adoptedValues']) {
  const { db } = deps.connection
  const kept = new Map<string, Promise<UnitData | null>>()

  function dataOf(unitId: number, quantity: EstimateQuantity, scope: Scope, epsg: number, version: number) {
    const key = [unitId, quantity, scope, epsg, version].join(':')
    const found = kept.get(key)
    if (found) return found
    const loading = loadUnitData(db, unitId, quantity, scope, epsg)
    loading.catch(() => kept.delete(key))
    kept.set(key, loading)
    if (kept.size > mostKept) kept.delete(kept.keys().next().value!)
    return loading
  }

  const fitting = new Map<string, Promise<UnitModel>>()

  /** A fit takes a thread for seconds: those who ask for the same one at the same moment wait for it together. */
  function fitOnce(unitId: number, quantity: EstimateQuantity, scope: Scope, dataVersion: number, data: UnitData) {
    const key = [unitId, quantity, scope, dataVersion].join(':')
    const running = fitting.get(key)
    if (running) return running
    const started = fit(unitId, quantity, scope, dataVersion, data).finally(() => fitting.delete(key))
    fitting.set(key, started)
    return started
  }

  async function fit(
    unitId: number,
    quantity: EstimateQuantity,
    scope: Scope,
    dataVersion: number,
    data: UnitData,
  ): Promise<UnitModel> {
    // Another process, or a fit that ended since the caller looked, may have stored it.
    const newest = await repository.newestModel(db, unitId, quantity, scope)
    if (newest && fits(newest, dataVersion, data)) return newest.model
    const input: FitModelInput = { values: data.siteValues, options: { quantity, barriers: data.barriers } }
    const model = await deps.workers.run<UnitModel>('fit-model', input)
    const stored = { ...model, fingerprint: fingerprintOf(data) }
    await repository.saveModel(db, { unitId, quantity, scope, dataVersion, model: stored, createdAt: deps.now() })
    return model
  }

  const fits = (newest: Newest, dataVersion: number, data: UnitData) =>
    newest.dataVersion === dataVersion || newest.model.fingerprint === fingerprintOf(data)

  return {
    /** The unit's values as they are now, with the newest model; the first estimate ever waits for a fit. */
    async current(unitId: number, quantity: EstimateQuantity, scope: Scope, epsg: number) {
      const dataVersion = await adoptedValues.dataVersion(db, unitId)
      const data = await dataOf(unitId, quantity, scope, epsg, dataVersion)
      if (!data) throw new AppError('estimate/unknown-unit')
      const newest = await repository.newestModel(db, unitId, quantity, scope)
      if (!newest)
        return { data, model: await fitOnce(unitId, quantity, scope, dataVersion, data), dataVersion, outdated: false }
      // The version that the answer names is that of the last change its reader could see.
      if (fits(newest, dataVersion, data)) return { data, ...newest, outdated: false }
      return { data, model: newest.model, dataVersion, outdated: true }
    },

    /** Fits every quantity and scope of a unit whose values have moved on since its newest model. */
    async refit(unitId: number, epsg: number, report: (done: number, total: number) => Promise<void>) {
      const work = scopes.flatMap((scope) => estimateQuantity.options.map((quantity) => ({ scope, quantity })))
      for (const [i, { scope, quantity }] of work.entries()) {
        await report(i, work.length)
        const dataVersion = await adoptedValues.dataVersion(db, unitId)
        const data = await dataOf(unitId, quantity, scope, epsg, dataVersion)
        const newest = await repository.newestModel(db, unitId, quantity, scope)
        if (!data || (newest && fits(newest, dataVersion, data))) continue
        await fitOnce(unitId, quantity, scope, dataVersion, data)
      }
      await report(work.length, work.length)
    },
  }
}
