import { adoptedHistory } from '#shared/contracts/adopted-values.ts'
import {
  analysis,
  analysisList,
  anyWorkbenchInputs,
  wellLossList,
  type AnalysisInput,
  type AnalysisUpdate,
  type ReviewInput,
  type SubmissionInput,
} from '#shared/contracts/analyses.ts'
import { nothing } from '#shared/contracts/common.ts'
import { api } from './client.ts'

export const fetchWorkbenchInputs = (testId: number, signal?: AbortSignal) =>
  api.get(`/api/pumping-tests/${testId}/inputs`, { response: anyWorkbenchInputs, signal })

export const fetchAnalyses = (testId: number, signal?: AbortSignal) =>
  api.get(`/api/pumping-tests/${testId}/analyses`, { response: analysisList, signal })

export const createAnalysis = (testId: number, body: AnalysisInput, idempotencyKey: string) =>
  api.post(`/api/pumping-tests/${testId}/analyses`, { body, response: analysis, idempotencyKey })

export const updateAnalysis = (id: number, body: AnalysisUpdate) =>
  api.put(`/api/analyses/${id}`, { body, response: analysis })

export const deleteAnalysis = (id: number) => api.delete(`/api/analyses/${id}`, { response: nothing })

export const submitAnalysis = (id: number, body: SubmissionInput, idempotencyKey: string) =>
  api.post(`/api/analyses/${id}/submission`, { body, response: analysis, idempotencyKey })

export const takeAnalysisBack = (id: number, rowVersion: number) =>
  api.delete(`/api/analyses/${id}/submission`, { query: { rowVersion }, response: analysis })

export const reviewAnalysis = (id: number, body: ReviewInput, idempotencyKey: string) =>
  api.post(`/api/analyses/${id}/review`, { body, response: analysis, idempotencyKey })

/** Every value that the test ever gave to the regional table, newest first. */
export const fetchAdoptedHistory = (testId: number, signal?: AbortSignal) =>
  api.get(`/api/pumping-tests/${testId}/adopted-values`, { response: adoptedHistory, signal })

/** Losses of a well by its accepted step-drawdown tests, newest test first. */
export const fetchWellLosses = (wellId: number, signal?: AbortSignal) =>
  api.get(`/api/wells/${wellId}/losses`, { response: wellLossList, signal })
