import {
  adoptedValue,
  adoptedValueList,
  type AdoptedValueFilters,
  type AdoptedValueQuery,
} from '#shared/contracts/adopted-values.ts'
import { nothing } from '#shared/contracts/common.ts'
import { address } from './addresses.ts'
import { api } from './client.ts'

/** The box is no filter of the page, and an address holds texts and numbers only. */
type Filters = Omit<AdoptedValueFilters, 'bbox'>

export const fetchAdoptedValues = (query: Omit<AdoptedValueQuery, 'bbox'>, signal?: AbortSignal) =>
  api.get('/api/adopted-values', { query: { ...query }, response: adoptedValueList, signal })

export const fetchAdoptedValue = (id: number, signal?: AbortSignal) =>
  api.get(`/api/adopted-values/${id}`, { response: adoptedValue, signal })

export const withdrawAdoptedValue = (id: number, reason: string, idempotencyKey: string) =>
  api.post(`/api/adopted-values/${id}/withdrawal`, { body: { reason }, response: nothing, idempotencyKey })

/** Where the rows that match can be downloaded, in the reader's units. */
export const adoptedValuesCsv = (filters: Filters, unitSystem: string): string =>
  address('/api/adopted-values.csv', { ...filters, unitSystem })
