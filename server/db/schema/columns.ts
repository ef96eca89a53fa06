import { bigint, customType, datetime, int } from 'drizzle-orm/mysql-core'

export const id = () => bigint({ mode: 'number', unsigned: true }).autoincrement().primaryKey()
export const reference = () => bigint({ mode: 'number', unsigned: true })
/** Instants are UTC with milliseconds. */
export const instant = () => datetime({ fsp: 3, mode: 'date' })
/** Sent back with every update; a stale one is an edit conflict. */
export const rowVersion = () => int().notNull().default(1)
/** Bytes of any number. */
export const bytes = customType<{ data: Uint8Array }>({ dataType: () => 'longblob' })
