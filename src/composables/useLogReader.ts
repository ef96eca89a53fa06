import { onScopeDispose } from 'vue'
import type { LogContext, LogInspection, LogMapping, Refusal } from '#shared/readings/model.ts'
import type { LogAnswer, LogPreview, LogRequest } from '../workers/read-log.worker.ts'

export type { LogPreview } from '../workers/read-log.worker.ts'

type Ask = LogRequest extends infer Each ? (Each extends LogRequest ? Omit<Each, 'id'> : never) : never

/** Looks at logs and reads them in a worker, which keeps the last one it was given. */
export function useLogReader() {
  const worker = new Worker(new URL('../workers/read-log.worker.ts', import.meta.url), { type: 'module' })
  const waiting = new Map<number, { resolve: (answer: LogAnswer['answer']) => void; reject: (why: Error) => void }>()
  let lastId = 0

  worker.addEventListener('message', ({ data }: MessageEvent<LogAnswer>) => {
    waiting.get(data.id)?.resolve(data.answer)
    waiting.delete(data.id)
  })
  worker.addEventListener('error', ({ message }) => {
    for (const { reject } of waiting.values()) reject(new Error(message))
    waiting.clear()
  })
  onScopeDispose(() => worker.terminate())

  function ask(request: Ask): Promise<LogAnswer['answer']> {
    lastId += 1
    const id = lastId
    return new Promise((resolve, reject) => {
      waiting.set(id, { resolve, reject })
      worker.postMessage({ ...request, id })
    })
  }

  return {
    inspect: (bytes: Uint8Array) => ask({ ask: 'inspect', bytes }) as Promise<LogInspection | Refusal>,
    read: (mapping: LogMapping<string>, context: LogContext) =>
      ask({ ask: 'read', mapping, context }) as Promise<LogPreview | Refusal>,
  }
}
