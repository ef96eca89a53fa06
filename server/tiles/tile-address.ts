import { z } from 'zod'

export interface TileAddress {
  z: number
  x: number
  y: number
}

const whole = z.string().regex(/^(0|[1-9]\d{0,6})$/).transform(Number)

const address = z
  .object({ z: whole.refine((zoom) => zoom <= 22), x: whole, y: whole })
  .refine((tile) => tile.x < 2 ** tile.z && tile.y < 2 ** tile.z)

/** The tile that an address names, or null where there can be none: not a whole number, or outside the world. */
export function parseTile(parts: Record<string, unknown>): TileAddress | null {
  const parsed = address.safeParse(parts)
  return parsed.success ? parsed.data : null
}
