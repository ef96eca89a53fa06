import { asc, eq } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { analysisInputParts } from '../../db/schema/index.ts'

/** Written twice as long in a statement; the smallest packet that a database may be set to take holds it many times. */
const partBytes = 1024 * 1024

/** Keeps the packed snapshot of an analysis in place of an earlier one. */
export async function savePackedInputs(executor: Executor, analysisId: number, packed: Uint8Array): Promise<void> {
  await deletePackedInputs(executor, analysisId)
  for (let part = 0; part * partBytes < packed.length; part += 1) {
    const bytes = packed.subarray(part * partBytes, (part + 1) * partBytes)
    await executor.insert(analysisInputParts).values({ analysisId, part, bytes })
  }
}

export const deletePackedInputs = (executor: Executor, analysisId: number) =>
  executor.delete(analysisInputParts).where(eq(analysisInputParts.analysisId, analysisId))

/** The packed snapshot of an analysis, whose JSON its schema in shared/contracts parses. @throws where there is none */
export async function readPackedInputs(executor: Executor, analysisId: number): Promise<Uint8Array> {
  const parts = await executor
    .select({ bytes: analysisInputParts.bytes })
    .from(analysisInputParts)
    .where(eq(analysisInputParts.analysisId, analysisId))
    .orderBy(asc(analysisInputParts.part))
  if (parts.length === 0) throw new Error(`Analysis ${analysisId} has no inputs`)
  return Buffer.concat(parts.map(({ bytes }) => bytes))
}
