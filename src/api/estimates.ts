import { estimate, nearbyTests, type EstimateQuery, type NearbyQuery } from '#shared/contracts/estimates.ts'
import { api } from './client.ts'

export const fetchEstimate = (query: EstimateQuery, signal?: AbortSignal) =>
  api.get('/api/estimates', { query: { ...query }, response: estimate, signal })

/** Tests within a radius, nearest first. */
export const fetchNearbyTests = (query: NearbyQuery, signal?: AbortSignal) =>
  api.get('/api/nearby-tests', { query: { ...query }, response: nearbyTests, signal })
