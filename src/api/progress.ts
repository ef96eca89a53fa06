import { job, type Job } from '#shared/contracts/jobs.ts'
import { parseJson } from './problem.ts'

type Listener = (job: Job) => void

const CHANNEL = 'basinbook-progress'
const listeners = new Set<Listener>()
/** Newest news of each job, so that who begins to listen late hears where it stands. */
const newest = new Map<number, Job>()
let stop: (() => void) | null = null

function tell(news: Job) {
  newest.set(news.id, news)
  for (const listener of listeners) listener(news)
}

const RETRY_MS = 5_000

/**
 * Opens the stream; `heard` gets each piece of news. A browser gives up for good after an answer that is no stream (the
 * session ended, the database was away), so it is opened again then.
 */
function openStream(heard: Listener): () => void {
  let source: EventSource
  let waiting: ReturnType<typeof setTimeout> | undefined

  function open() {
    source = new EventSource('/api/progress')
    source.addEventListener('job', (event: MessageEvent<string>) => {
      const parsed = job.safeParse(parseJson(event.data))
      if (parsed.success) heard(parsed.data)
    })
    source.addEventListener('error', () => {
      if (source.readyState === EventSource.CLOSED) waiting = setTimeout(open, RETRY_MS)
    })
  }

  open()
  return () => {
    clearTimeout(waiting)
    source.close()
  }
}

/**
 * One stream for all tabs of a browser, because a browser grants a server few connections:
 * the tab that holds the lock listens and passes the news on; when it closes, another takes over.
 */
function shareStream(): () => void {
  const channel = new BroadcastChannel(CHANNEL)
  const giveUp = new AbortController()
  channel.onmessage = ({ data }) => {
    if (data === 'hello') return newest.forEach((news) => channel.postMessage(news))
    const parsed = job.safeParse(data)
    if (parsed.success) tell(parsed.data)
  }
  channel.postMessage('hello')
  const lead = () =>
    new Promise<void>((resolve) => {
      const close = openStream((news) => {
        tell(news)
        channel.postMessage(news)
      })
      giveUp.signal.addEventListener('abort', () => resolve(close()))
    })
  // Rejects when given up while it waited for its turn.
  navigator.locks.request(CHANNEL, { signal: giveUp.signal }, lead).catch(() => undefined)
  return () => {
    giveUp.abort()
    channel.close()
  }
}

/** Locks exist on https and loopback only; elsewhere each tab has its own stream. */
const begin = () => ('locks' in navigator && 'BroadcastChannel' in window ? shareStream() : openStream(tell))

/** Hears of every job that the reader may follow, until the returned function is called. */
export function followProgress(listener: Listener): () => void {
  listeners.add(listener)
  newest.forEach(listener)
  stop ??= begin()
  return () => {
    listeners.delete(listener)
    if (listeners.size > 0) return
    stop?.()
    stop = null
    newest.clear()
  }
}
