import { z } from 'zod'
import { latitude, longitude } from './common.ts'

/** One map that can lie under the data. */
export const basemap = z.object({
  id: z.enum(['bundled', 'custom']),
  /** Addresses with {z}, {x}, {y}. */
  urls: z.object({ light: z.string(), dark: z.string() }),
  minZoom: z.int().nonnegative(),
  /** Deepest zoom with tiles of its own; a browser enlarges those further in. */
  maxNativeZoom: z.int().nonnegative(),
  /** West, south, east, north in degrees; null for the whole world. */
  bounds: z.tuple([longitude, latitude, longitude, latitude]).nullable(),
  attribution: z.string(),
})
export type Basemap = z.infer<typeof basemap>
