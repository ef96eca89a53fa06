import { created } from '#shared/contracts/pumping-tests.ts'
import { visibilityAnswer, type VisibilityInput } from '#shared/contracts/visibility.ts'
import { well, wellList, type WellInput, type WellQuery, type WellUpdate } from '#shared/contracts/wells.ts'
import { api } from './client.ts'

export const fetchWells = (query: WellQuery, signal?: AbortSignal) =>
  api.get('/api/wells', { query, response: wellList, signal })

export const fetchWell = (id: number, signal?: AbortSignal) => api.get(`/api/wells/${id}`, { response: well, signal })

export const createWell = (body: WellInput, idempotencyKey: string) =>
  api.post('/api/wells', { body, response: created, idempotencyKey })

export const updateWell = (id: number, body: WellUpdate) => api.put(`/api/wells/${id}`, { body, response: created })

export const setWellVisibility = (id: number, body: VisibilityInput) =>
  api.put(`/api/wells/${id}/visibility`, { body, response: visibilityAnswer })
