import { asc } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { boundaries, boundaryUnits } from '../../db/schema/index.ts'

export const listBoundaries = (executor: Executor) => executor.select().from(boundaries).orderBy(asc(boundaries.id))
export const listBoundaryUnits = (executor: Executor) => executor.select().from(boundaryUnits)
