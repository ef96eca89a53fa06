import { boundaryList } from '#shared/contracts/map.ts'
import { api } from './client.ts'

export const fetchBoundaries = (signal?: AbortSignal) => api.get('/api/boundaries', { response: boundaryList, signal })
