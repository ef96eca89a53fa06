import { useQueryCache } from '@pinia/colada'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { Well } from '#shared/contracts/wells.ts'
import type { fetchAquiferUnits } from '../../api/aquifer-units.ts'

/** What wells and aquifer units of versions of a test are called: by the tests seen, else by what the form has fetched. */
export function useFormNames() {
  const queries = useQueryCache()
  const wells = new Map<number, string>()
  const units = new Map<number, string>()

  function learn(test: PumpingTest) {
    for (const { wellId, code } of test.wells) wells.set(wellId, code)
    for (const { unitId, name } of test.units) units.set(unitId, name)
  }
  const wellName = (id: number) => wells.get(id) ?? queries.getQueryData<Well>(['wells', id])?.code ?? 'another well'
  const fetchedUnits = () =>
    queries.getQueryData<Awaited<ReturnType<typeof fetchAquiferUnits>>>(['aquifer-units'])?.items ?? []
  const unitName = (id: number) =>
    units.get(id) ?? fetchedUnits().find((unit) => unit.id === id)?.name ?? 'another unit'

  return { learn, wellName, unitName }
}
