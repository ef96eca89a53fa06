import { problem as problemSchema, type FieldProblem, type Problem } from '#shared/contracts/problem.ts'
import { errorText, errorStatus, isErrorCode, type ErrorCode } from '#shared/words/errors/index.ts'

/** An answer that is not a success, as the server described it. Its message is a sentence for the reader. */
export class ApiProblem extends Error {
  override name = 'ApiProblem'
  readonly problem: Problem

  constructor(problem: Problem) {
    super(problem.detail)
    this.problem = problem
  }

  get code(): string {
    return this.problem.code
  }

  get status(): number {
    return this.problem.status
  }

  get fields(): FieldProblem[] {
    return this.problem.fields
  }

  /** A problem that the browser found itself. */
  static of(code: ErrorCode): ApiProblem {
    const detail = errorText(code)
    const status = errorStatus(code)
    return new ApiProblem({
      type: 'about:blank',
      title: detail,
      status,
      code,
      detail,
      params: {},
      fields: [],
      requestId: '',
    })
  }

  /** From the body of an answer. A proxy in between may answer with its own page: then only the status counts. */
  static fromBody(status: number, body: string): ApiProblem {
    const parsed = problemSchema.safeParse(parseJson(body))
    if (parsed.success) return new ApiProblem(parsed.data)
    return ApiProblem.of(status === 502 || status === 503 || status === 504 ? 'client/offline' : 'client/unreadable')
  }
}

/** The sentence of a field's error, from its code. */
export function fieldText({ code, params }: FieldProblem): string {
  return isErrorCode(code) ? errorText(code, params) : errorText('field/invalid')
}

export function parseJson(text: string): unknown {
  try {
    return JSON.parse(text)
  } catch {
    return undefined
  }
}
