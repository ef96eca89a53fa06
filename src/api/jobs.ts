import { nothing, type Paging } from '#shared/contracts/common.ts'
import { jobList } from '#shared/contracts/jobs.ts'
import { api } from './client.ts'

export const fetchJobs = (query: Paging, signal?: AbortSignal) =>
  api.get('/api/jobs', { query, response: jobList, signal })

export const cancelJob = (id: number) => api.post(`/api/jobs/${id}/cancellation`, { response: nothing })
