import { aquiferUnitDetail, aquiferUnitList } from '#shared/contracts/map.ts'
import { unitStatistics, type UnitStatisticsQuery } from '#shared/contracts/unit-statistics.ts'
import { api } from './client.ts'

export const fetchAquiferUnits = (signal?: AbortSignal) =>
  api.get('/api/aquifer-units', { response: aquiferUnitList, signal })

export const fetchAquiferUnit = (id: number, signal?: AbortSignal) =>
  api.get(`/api/aquifer-units/${id}`, { response: aquiferUnitDetail, signal })

export const fetchUnitStatistics = (id: number, query: UnitStatisticsQuery, signal?: AbortSignal) =>
  api.get(`/api/aquifer-units/${id}/statistics`, { query: { ...query }, response: unitStatistics, signal })
