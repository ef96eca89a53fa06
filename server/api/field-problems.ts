import type { z } from 'zod'
import type { FieldProblem } from '#shared/contracts/problem.ts'
import { isErrorCode } from '#shared/words/errors/index.ts'

type Issue = z.core.$ZodIssue

const bound = (value: number | bigint) => Number(value)
/** Text and lists are counted, numbers are compared. */
const counted = (origin: string) => origin === 'string' || origin === 'array'

const rules: { [Code in Issue['code']]?: (issue: Extract<Issue, { code: Code }>) => Omit<FieldProblem, 'path'> } = {
  too_small: ({ origin, minimum }) => ({
    code: counted(origin) ? (Number(minimum) === 1 ? 'field/required' : 'field/too-short') : 'field/too-small',
    params: { minimum: bound(minimum) },
  }),
  too_big: ({ origin, maximum }) => ({
    code: counted(origin) ? 'field/too-long' : 'field/too-large',
    params: { maximum: bound(maximum) },
  }),
  invalid_format: ({ format }) => ({ code: 'field/format', params: { format } }),
  invalid_value: ({ values }) => ({ code: 'field/choice', params: { options: values.map(String).join(', ') } }),
  unrecognized_keys: ({ keys }) => ({ code: 'field/unknown', params: { keys: keys.join(', ') } }),
  invalid_type: ({ input }) => ({ code: input === undefined ? 'field/required' : 'field/invalid', params: {} }),
}

/** A refinement or a bound may name one of our codes as its message, a refinement with parameters beside it. */
function own(issue: Issue): Omit<FieldProblem, 'path'> | null {
  if (!isErrorCode(issue.message)) return null
  const params = issue.code === 'custom' ? (issue.params ?? {}) : {}
  return { code: issue.message, params: params as FieldProblem['params'] }
}

/** What zod found, as fields with codes; `prefix` tells the address and the query string apart from the body. */
export function fieldProblems(error: z.ZodError, prefix: string): FieldProblem[] {
  return error.issues.map((issue) => {
    const rule = rules[issue.code] as ((issue: Issue) => Omit<FieldProblem, 'path'>) | undefined
    const found = own(issue) ?? rule?.(issue) ?? { code: 'field/invalid', params: {} }
    return { path: [prefix, ...issue.path.map(String)].filter(Boolean).join('.'), ...found }
  })
}
