import { z } from 'zod'

/** What the map knows near the pumped well of a test: streams connected to its unit, and edges of that unit. */
export const surrounding = z.object({
  /** What a solution with boundaries takes it for. */
  kind: z.enum(['recharge', 'barrier']),
  name: z.string(),
  /** Shortest distance from the pumped well, and its direction in degrees clockwise from north. */
  distance_m: z.number().positive(),
  bearing_deg: z.number(),
})
export type Surrounding = z.infer<typeof surrounding>
