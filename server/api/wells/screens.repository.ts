import { asc, inArray } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { wellScreens } from '../../db/schema/index.ts'

/** Screens of the wells, whenever they were valid; the uppermost first. */
export const listScreens = (executor: Executor, wellIds: number[]) =>
  executor.select().from(wellScreens).where(inArray(wellScreens.wellId, wellIds)).orderBy(asc(wellScreens.topM))
