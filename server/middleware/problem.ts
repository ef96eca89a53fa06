import type { ErrorRequestHandler, Request, RequestHandler } from 'express'
import type { Problem } from '#shared/contracts/problem.ts'
import { errorText, type ErrorCode } from '#shared/words/errors/index.ts'
import { isFull, isUnreachable } from '../db/retry.ts'
import { AppError } from '../errors.ts'

export const requestId = (req: Request): string => String(req.id ?? '')

/** Errors of Express and its body parsers, by the status they carry; others of the 400s are malformed requests. */
const bodyErrors: Record<number, ErrorCode> = { 404: 'request/not-found', 413: 'request/too-large' }

const codeOf = (status: number): ErrorCode | undefined =>
  status >= 400 && status < 500 ? (bodyErrors[status] ?? 'request/malformed') : undefined

function toAppError(error: unknown, req: Request): AppError {
  if (error instanceof AppError) return error
  if (isUnreachable(error)) return new AppError('server/unavailable')
  if (isFull(error)) return new AppError('server/full')
  const status = error instanceof Error && 'status' in error ? Number(error.status) : 500
  const code = codeOf(status)
  if (code) return new AppError(code, code === 'request/too-large' ? { limit: '1 MB' } : {})
  return new AppError('server/failed', { requestId: requestId(req) })
}

export function problemOf(error: AppError, id: string): Problem {
  return {
    type: 'about:blank',
    title: errorText(error.code, error.params),
    status: error.status,
    code: error.code,
    detail: errorText(error.code, error.params),
    params: error.params,
    fields: error.fields,
    requestId: id,
  }
}

export const unknownAddress: RequestHandler = () => {
  throw new AppError('request/not-found')
}

/** The only place that answers with an error. */
export const sendProblem: ErrorRequestHandler = (error, req, res, next) => {
  if (res.headersSent) return next(error)
  const known = toAppError(error, req)
  if (known.status >= 500) req.log.error({ err: error }, 'request failed')
  if (known.code === 'server/unavailable') res.set('Retry-After', '5')
  res
    .status(known.status)
    .type('application/problem+json')
    .send(JSON.stringify(problemOf(known, requestId(req))))
}
