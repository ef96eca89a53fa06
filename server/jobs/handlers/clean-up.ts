import { readdir, rm, stat } from 'node:fs/promises'
import { join } from 'node:path'
import { eq, lt } from 'drizzle-orm'
import { uploadFolder } from '../../api/reading-series/upload.ts'
import type { Deps } from '../../deps.ts'
import { idempotencyKeys, passwordTokens, rateLimits, sessions, wellCells } from '../../db/schema/index.ts'
import type { JobHandler } from '../jobs.ts'

const day = 86_400_000

/**
 * Removes what has run out: sessions, tokens, counters, request keys, cells of the map that all wells have left, uploads
 * of a process that crashed.
 */
export function cleanUp({ config, connection: { db }, now }: Deps): JobHandler {
  return async () => {
    const at = now()
    await db.delete(sessions).where(lt(sessions.expiresAt, at))
    await db.delete(rateLimits).where(lt(rateLimits.resetAt, at))
    await db.delete(passwordTokens).where(lt(passwordTokens.expiresAt, new Date(at.getTime() - 30 * day)))
    await db.delete(idempotencyKeys).where(lt(idempotencyKeys.createdAt, new Date(at.getTime() - day)))
    await db.delete(wellCells).where(eq(wellCells.wellCount, 0))
    await removeOldFiles(uploadFolder(config), new Date(at.getTime() - day))
  }
}

/** Requests end within minutes, and remove their files; the folder is not there before the first upload. */
async function removeOldFiles(folder: string, before: Date): Promise<void> {
  const names = await readdir(folder).catch(() => [])
  for (const name of names) {
    const path = join(folder, name)
    const found = await stat(path).catch(() => null)
    if (found && found.mtime < before) await rm(path, { force: true })
  }
}
