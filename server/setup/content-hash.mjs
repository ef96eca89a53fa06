import { createHash } from 'node:crypto'
import { existsSync, readdirSync, readFileSync, statSync } from 'node:fs'
import { join } from 'node:path'

/**
 * @param {string} path
 * @returns {string[]} the file itself, or all files below a folder, in a fixed order
 */
function filesBelow(path) {
  if (!existsSync(path)) return []
  if (!statSync(path).isDirectory()) return [path]
  return readdirSync(path)
    .sort()
    .flatMap((name) => filesBelow(join(path, name)))
}

/**
 * One hash over the names and contents of files: equal as long as nothing changed.
 * @param {string} root
 * @param {string[]} paths files and folders, relative to root
 * @param {string[]} extra further texts that matter
 */
export function contentHash(root, paths, extra = []) {
  const hash = createHash('sha256')
  for (const text of extra) hash.update(`${text}\0`)
  for (const file of paths.flatMap((path) => filesBelow(join(root, path)))) {
    hash
      .update(`${file.slice(root.length)}\0`)
      .update(readFileSync(file))
      .update('\0')
  }
  return hash.digest('hex')
}
