import { mkdir, readFile, rename, rm, writeFile } from 'node:fs/promises'
import { dirname, join } from 'node:path'
import { randomUUID } from 'node:crypto'
import type { Storage } from './storage.ts'

const safeKey = /^[a-z0-9][a-z0-9._/-]*$/i

/** Files in a folder; a file appears whole or not at all. */
export function folderStorage(folder: string): Storage {
  function pathOf(key: string) {
    if (!safeKey.test(key) || key.includes('..')) throw new Error(`not a storage key: ${key}`)
    return join(folder, key)
  }
  return {
    async put(key, bytes) {
      const path = pathOf(key)
      await mkdir(dirname(path), { recursive: true })
      const part = `${path}.${randomUUID()}.part`
      await writeFile(part, bytes, { mode: 0o600 })
      await rename(part, path)
    },
    async get(key) {
      return readFile(pathOf(key)).catch((error: NodeJS.ErrnoException) => {
        if (error.code === 'ENOENT') return null
        throw error
      })
    },
    remove: (key) => rm(pathOf(key), { force: true }),
  }
}
