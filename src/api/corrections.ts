import { nothing } from '#shared/contracts/common.ts'
import {
  correction,
  testCorrections,
  type CorrectionInput,
  type CorrectionUpdate,
} from '#shared/contracts/corrections.ts'
import { otherWell, type OtherWellInput, type OtherWellUpdate } from '#shared/contracts/other-wells.ts'
import {
  outsideCreated,
  outsideRows,
  outsideValues,
  type OutsideInput,
  type OutsideRowQuery,
} from '#shared/contracts/outside-series.ts'
import { api } from './client.ts'

export const fetchCorrections = (testId: number, signal?: AbortSignal) =>
  api.get(`/api/pumping-tests/${testId}/corrections`, { response: testCorrections, signal })

export const createCorrection = (testId: number, body: CorrectionInput, idempotencyKey: string) =>
  api.post(`/api/pumping-tests/${testId}/corrections`, { body, response: correction, idempotencyKey })

export const updateCorrection = (id: number, body: CorrectionUpdate) =>
  api.put(`/api/corrections/${id}`, { body, response: correction })

export const removeCorrection = (id: number, rowVersion: number) =>
  api.delete(`/api/corrections/${id}`, { query: { rowVersion }, response: nothing })

export const createOtherWell = (testId: number, body: OtherWellInput, idempotencyKey: string) =>
  api.post(`/api/pumping-tests/${testId}/other-wells`, { body, response: otherWell, idempotencyKey })

export const updateOtherWell = (id: number, body: OtherWellUpdate) =>
  api.put(`/api/other-wells/${id}`, { body, response: otherWell })

export const removeOtherWell = (id: number, rowVersion: number) =>
  api.delete(`/api/other-wells/${id}`, { query: { rowVersion }, response: nothing })

export function uploadOutside(testId: number, file: File, request: OutsideInput, idempotencyKey: string) {
  const body = new FormData()
  body.append('request', JSON.stringify(request))
  body.append('file', file)
  return api.post(`/api/pumping-tests/${testId}/outside-series`, { body, response: outsideCreated, idempotencyKey })
}

export const fetchOutsideRows = (id: number, query: OutsideRowQuery, signal?: AbortSignal) =>
  api.get(`/api/outside-series/${id}/rows`, { query, response: outsideRows, signal })

export const fetchOutsideValues = (id: number, signal?: AbortSignal) =>
  api.get(`/api/outside-series/${id}/values`, { response: outsideValues, signal })

export const deleteOutside = (id: number, rowVersion: number) =>
  api.delete(`/api/outside-series/${id}`, { query: { rowVersion }, response: nothing })

/** Address of a series as it was uploaded. */
export const outsideFileAddress = (id: number) => `/api/outside-series/${id}/file`
