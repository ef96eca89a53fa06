import { searchHits } from '#shared/contracts/map.ts'
import { api } from './client.ts'

export const fetchSearchHits = (text: string, signal?: AbortSignal) =>
  api.get('/api/search', { query: { text }, response: searchHits, signal })
