import { fileURLToPath } from 'node:url'
import { Piscina } from 'piscina'
import type { Workers } from './workers.ts'

/** The longest log that may be uploaded takes a third of it; a task that wants more fails alone, not the whole server. */
const mostMemoryMb = 1024

/** Worker threads that run the tasks of tasks/index.ts. */
export function createWorkers(threads: number, memoryMb = mostMemoryMb): Workers {
  const pool = new Piscina({
    filename: fileURLToPath(new URL('./tasks/index.ts', import.meta.url)),
    // A worker of a parent that does not itself run under tsx must be told how to read TypeScript.
    execArgv: ['--import', 'tsx'],
    minThreads: 0,
    maxThreads: threads,
    idleTimeout: 60_000,
    resourceLimits: { maxOldGenerationSizeMb: memoryMb },
  })
  return {
    run: (name, input, signal) => pool.run({ name, input }, signal ? { signal } : {}),
    close: () => pool.destroy(),
  }
}
