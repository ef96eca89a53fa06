import { z } from 'zod'

export const recordId = z.int().positive()
/** A record id in an address or query string: digits as a person would copy them, no other spelling of a number. */
export const idInPath = z.coerce
  .string()
  .regex(/^[1-9]\d{0,14}$/)
  .transform(Number)
export const idParams = z.object({ id: idInPath })
export const rowVersion = z.int().positive()
export const instant = z.iso.datetime()
export const longitude = z.number().min(-180).max(180)
export const latitude = z.number().min(-90).max(90)

/** Lists answer with their items, the total, and the offset of the next page or null. */
export const listOf = <Item extends z.ZodType>(item: Item) =>
  z.object({ items: z.array(item), total: z.int().nonnegative(), next: z.int().nonnegative().nullable() })

export const paging = z.object({
  limit: z.coerce.number().int().min(1).max(500).default(50),
  offset: z.coerce.number().int().min(0).default(0),
})
export type Paging = z.infer<typeof paging>

/** `west,south,east,north` in degrees. */
export const boundingBox = z
  .string()
  .transform((text) => text.split(',').map(Number))
  .pipe(z.tuple([longitude, latitude, longitude, latitude]))

export const nothing = z.object({})
