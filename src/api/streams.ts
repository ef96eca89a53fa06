import { streamDetail, streamList } from '#shared/contracts/map.ts'
import { api } from './client.ts'

export const fetchStreams = (signal?: AbortSignal) => api.get('/api/streams', { response: streamList, signal })

export const fetchStream = (id: number, signal?: AbortSignal) =>
  api.get(`/api/streams/${id}`, { response: streamDetail, signal })
