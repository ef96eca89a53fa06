import { region, type RegionEdit } from '#shared/contracts/region.ts'
import { api } from './client.ts'

export const fetchRegion = (signal?: AbortSignal) => api.get('/api/region', { response: region, signal })

export const editRegion = (body: RegionEdit) => api.patch('/api/region', { body, response: region })
