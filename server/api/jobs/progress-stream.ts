import type { Response } from 'express'
import type { Job } from '#shared/contracts/jobs.ts'

const pollMs = 700
/** A job that ended this long before the stream opened is still told, so that a reload misses nothing. */
const lookBackMs = 60_000

interface StreamOptions {
  load: (endedSince: Date) => Promise<Job[]>
  now: () => Date
  stopping: AbortSignal
}

/** Server-sent events named `job`, one for each change of a job the viewer may follow, until the browser or the server ends it. */
export function streamProgress(res: Response, { load, now, stopping }: StreamOptions): Promise<void> {
  res.set({ 'Content-Type': 'text/event-stream', 'Cache-Control': 'no-store, no-transform', 'X-Accel-Buffering': 'no' })
  res.flushHeaders()
  res.write('retry: 2000\n\n')
  const told = new Map<number, string>()
  const opened = now().getTime()

  return new Promise((resolve) => {
    let timer: NodeJS.Timeout
    const end = () => {
      clearTimeout(timer)
      stopping.removeEventListener('abort', end)
      res.end()
      resolve()
    }
    const look = async () => {
      try {
        for (const job of await load(new Date(opened - lookBackMs))) tell(res, told, job)
        if (!res.writableEnded) timer = setTimeout(look, pollMs)
      } catch {
        // The database is away: the browser reconnects by itself and meets the answer of the ordinary routes.
        end()
      }
    }
    res.on('close', end)
    stopping.addEventListener('abort', end)
    void look()
  })
}

function tell(res: Response, told: Map<number, string>, job: Job) {
  const text = JSON.stringify(job)
  if (told.get(job.id) === text || res.writableEnded) return
  told.set(job.id, text)
  res.write(`event: job\nid: ${job.id}\ndata: ${text}\n\n`)
}
