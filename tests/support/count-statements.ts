import type { Pool } from 'mysql2/promise'

interface Counted {
  query: (...args: unknown[]) => unknown
  execute: (...args: unknown[]) => unknown
}

/**
 * Counts the statements that go through this pool from now on. The server's own counter would not do: other test files
 * use the same server at the same time.
 */
export function countStatements({ pool }: Pool): () => number {
  let statements = 0
  const known = new WeakSet<object>()
  pool.on('acquire', (acquired) => {
    const connection = acquired as unknown as Counted
    if (known.has(connection)) return
    known.add(connection)
    for (const name of ['query', 'execute'] as const) {
      const original = connection[name].bind(connection)
      connection[name] = (...args) => {
        statements += 1
        return original(...args)
      }
    }
  })
  return () => statements
}
