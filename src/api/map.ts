import { mapWells, type MapWellQuery } from '#shared/contracts/map.ts'
import { api } from './client.ts'

export const fetchMapWells = (query: MapWellQuery, signal?: AbortSignal) =>
  api.get('/api/map/wells', { query, response: mapWells, signal })
