import type { Response } from 'express'
import type { Job } from '#shared/contracts/jobs.ts'

const pollMs = 700
/** So often a line goes out that keeps proxies from closing a quiet stream, and rights are looked up again. */
const heartbeatMs = 15_000
/** A job that ended this long before the stream opened is still told, so that a reload misses nothing. */
const lookBackMs = 60_000

interface StreamOptions {
  load: (endedSince: Date) => Promise<Job[]>
  /** Whether the person who opened the stream may still follow it. */
  mayGoOn: () => Promise<boolean>
  now: () => Date
  stopping: AbortSignal
}

/**
 * Server-sent events named `job`, one for each change of a job the viewer may follow, until the browser or the server
 * ends it, or the viewer's session is over: the browser then connects again and is told so.
 */
export function streamProgress(res: Response, { load, mayGoOn, now, stopping }: StreamOptions): Promise<void> {
  res.set({ 'Content-Type': 'text/event-stream', 'Cache-Control': 'no-store, no-transform', 'X-Accel-Buffering': 'no' })
  res.flushHeaders()
  res.write('retry: 2000\n\n')
  const told = new Map<number, string>()
  const opened = now().getTime()
  let beaten = opened

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
        if (now().getTime() - beaten >= heartbeatMs) {
          if (!(await mayGoOn())) return end()
          beaten = now().getTime()
          if (!res.writableEnded) res.write(': still here\n\n')
        }
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
