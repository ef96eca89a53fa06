import { ApiProblem } from './problem.ts'

export interface Outgoing {
  method: string
  path: string
  headers: Record<string, string>
  body: string | FormData | null
  signal?: AbortSignal | undefined
  /** Share of the body that has been sent, 0 to 1. */
  onProgress?: ((share: number) => void) | undefined
}

export interface Incoming {
  status: number
  body: string
}

const aborted = () => new DOMException('The request was given up.', 'AbortError')

async function byFetch({ method, path, headers, body, signal }: Outgoing): Promise<Incoming> {
  try {
    const response = await fetch(path, { method, headers, body, signal: signal ?? null, credentials: 'same-origin' })
    return { status: response.status, body: await response.text() }
  } catch (error) {
    if (signal?.aborted) throw aborted()
    if (error instanceof TypeError) throw ApiProblem.of('client/offline')
    throw error
  }
}

/** fetch cannot tell how much of a body has been sent; XMLHttpRequest can. */
function byXhr({ method, path, headers, body, signal, onProgress }: Outgoing): Promise<Incoming> {
  return new Promise((resolve, reject) => {
    const xhr = new XMLHttpRequest()
    xhr.open(method, path)
    for (const [name, value] of Object.entries(headers)) xhr.setRequestHeader(name, value)
    xhr.upload.onprogress = ({ loaded, total }) => onProgress?.(total > 0 ? loaded / total : 0)
    xhr.onload = () => resolve({ status: xhr.status, body: xhr.responseText })
    xhr.onerror = () => reject(ApiProblem.of('client/offline'))
    xhr.onabort = () => reject(aborted())
    signal?.addEventListener('abort', () => xhr.abort(), { once: true })
    xhr.send(body)
  })
}

export const transport = (outgoing: Outgoing): Promise<Incoming> =>
  outgoing.onProgress ? byXhr(outgoing) : byFetch(outgoing)
