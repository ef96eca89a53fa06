import type { Request, Response } from 'express'
import type { z } from 'zod'
import type { Action, Viewer } from '#shared/contracts/permissions.ts'

export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete'
/** Named rate limits; the numbers stand in middleware/rate-limit.ts. */
export type Limit = 'usual' | 'sign-in' | 'mail' | 'upload' | 'heavy'

type Parsed<Schema> = Schema extends z.ZodType ? z.output<Schema> : undefined

export interface Call<Params, Query, Body> {
  params: Params
  query: Query
  body: Body
  viewer: Viewer
  req: Request
  res: Response
}

interface Definition<Params, Query, Body, Answer> {
  method: Method
  path: `/${string}`
  /** Checked by `can` before anything is parsed. */
  action: Action
  /** One line for the API description. */
  summary: string
  params?: Params
  query?: Query
  body?: Body
  /** A schema: the handler's value is parsed with it and sent as JSON. 'sent': the handler writes the response itself. */
  response: Answer
  status?: number
  limit?: Limit
  /** Express handlers that must run before the body is parsed, such as an upload. */
  before?: import('express').RequestHandler[]
}

export interface Route {
  method: Method
  path: `/${string}`
  action: Action
  summary: string
  params: z.ZodType | undefined
  query: z.ZodType | undefined
  body: z.ZodType | undefined
  response: z.ZodType | 'sent'
  status: number
  limit: Limit
  before: import('express').RequestHandler[]
  handle: (call: Call<unknown, unknown, unknown>) => unknown
}

/** The only way to make a route: permissions, rate limits, CSRF and the API description all come from here. */
export function route<
  Params extends z.ZodType | undefined = undefined,
  Query extends z.ZodType | undefined = undefined,
  Body extends z.ZodType | undefined = undefined,
  Answer extends z.ZodType | 'sent' = z.ZodType,
>(
  definition: Definition<Params, Query, Body, Answer>,
  handle: (
    call: Call<Parsed<Params>, Parsed<Query>, Parsed<Body>>,
  ) => Answer extends z.ZodType ? Promise<z.input<Answer>> | z.input<Answer> : Promise<void> | void,
): Route {
  const { params, query, body, status = 200, limit = 'usual', before = [] } = definition
  return {
    ...definition,
    params,
    query,
    body,
    status,
    limit,
    before,
    handle: handle as Route['handle'],
  }
}
