import { errorStatus, errorText, type ErrorCode, type ErrorParams } from '#shared/words/errors/index.ts'
import type { FieldProblem } from '#shared/contracts/problem.ts'

/** The one error that services throw on purpose; the middleware turns it into the answer. */
export class AppError extends Error {
  readonly status: number

  constructor(
    readonly code: ErrorCode,
    readonly params: ErrorParams = {},
    readonly fields: FieldProblem[] = [],
  ) {
    super(errorText(code, params))
    this.status = errorStatus(code)
  }
}

export const notFound = () => new AppError('request/not-found')

/** An error under one form field. */
export const fieldError = (path: string, code: ErrorCode, params: ErrorParams = {}) =>
  new AppError('request/invalid', {}, [{ path, code, params }])
