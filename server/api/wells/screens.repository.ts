import { asc, eq } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { wellScreens } from '../../db/schema/index.ts'

export const listScreens = (executor: Executor, wellId: number) =>
  executor.select().from(wellScreens).where(eq(wellScreens.wellId, wellId)).orderBy(asc(wellScreens.topM))
