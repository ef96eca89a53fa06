import { nothing } from '#shared/contracts/common.ts'
import {
  readingRows,
  seriesCreated,
  type ReadingDecision,
  type ReadingRowQuery,
  type SeriesInput,
} from '#shared/contracts/reading-series.ts'
import { api } from './client.ts'

export interface SeriesUpload {
  testId: number
  file: File
  request: SeriesInput
  onProgress: (share: number) => void
}

export function uploadSeries({ testId, file, request, onProgress }: SeriesUpload, idempotencyKey: string) {
  const body = new FormData()
  body.append('request', JSON.stringify(request))
  body.append('file', file)
  const path = `/api/pumping-tests/${testId}/reading-series`
  return api.post(path, { body, response: seriesCreated, idempotencyKey, onProgress })
}

export const fetchReadingRows = (id: number, query: ReadingRowQuery, signal?: AbortSignal) =>
  api.get(`/api/reading-series/${id}/rows`, { query, response: readingRows, signal })

export const decideReadings = (id: number, body: ReadingDecision, idempotencyKey: string) =>
  api.post(`/api/reading-series/${id}/decisions`, { body, response: nothing, idempotencyKey })

export const deleteSeries = (id: number, rowVersion: number) =>
  api.delete(`/api/reading-series/${id}`, { query: { rowVersion }, response: nothing })

/** Address of the log as it was uploaded. */
export const seriesFileAddress = (id: number) => `/api/reading-series/${id}/file`
