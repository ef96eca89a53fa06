import {
  created,
  pumpingTest,
  pumpingTestList,
  type PumpingTestInput,
  type PumpingTestQuery,
  type PumpingTestUpdate,
} from '#shared/contracts/pumping-tests.ts'
import { visibilityAnswer, type VisibilityInput } from '#shared/contracts/visibility.ts'
import { api } from './client.ts'

export const fetchPumpingTests = (query: PumpingTestQuery, signal?: AbortSignal) =>
  api.get('/api/pumping-tests', { query, response: pumpingTestList, signal })

export const fetchPumpingTest = (id: number, signal?: AbortSignal) =>
  api.get(`/api/pumping-tests/${id}`, { response: pumpingTest, signal })

export const createPumpingTest = (body: PumpingTestInput, idempotencyKey: string) =>
  api.post('/api/pumping-tests', { body, response: created, idempotencyKey })

export const updatePumpingTest = (id: number, body: PumpingTestUpdate) =>
  api.put(`/api/pumping-tests/${id}`, { body, response: pumpingTest })

export const setPumpingTestVisibility = (id: number, body: VisibilityInput) =>
  api.put(`/api/pumping-tests/${id}/visibility`, { body, response: visibilityAnswer })
