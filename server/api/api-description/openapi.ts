import { z } from 'zod'
import { actions } from '#shared/contracts/permissions.ts'
import { problem } from '#shared/contracts/problem.ts'
import type { Route } from '../registry.ts'

type Json = Record<string, unknown>

/** What cannot be said in JSON Schema (a transform, say) is described by what goes in or comes out of it. */
const schemaOf = (schema: z.ZodType, io: 'input' | 'output') => {
  const { $schema: _, ...json } = z.toJSONSchema(schema, { target: 'openapi-3.0', io, unrepresentable: 'any' }) as Json
  return json
}

/** `/api/people/:id` → `/api/people/{id}` */
const pathOf = (path: string) => path.replace(/:(\w+)/g, '{$1}')
const namesIn = (path: string) => [...path.matchAll(/:(\w+)/g)].map(([, name]) => name!)

function propertiesOf(schema: z.ZodType | undefined): { properties: Record<string, Json>; required: string[] } {
  const json: Json = schema ? schemaOf(schema, 'input') : {}
  return {
    properties: (json.properties ?? {}) as Record<string, Json>,
    required: (json.required ?? []) as string[],
  }
}

function parametersOf(route: Route): Json[] {
  const inPath = propertiesOf(route.params).properties
  const { properties, required } = propertiesOf(route.query)
  return [
    ...namesIn(route.path).map((name) => ({
      name,
      in: 'path',
      required: true,
      schema: inPath[name] ?? { type: 'string' },
    })),
    ...Object.entries(properties).map(([name, schema]) => ({
      name,
      in: 'query',
      required: required.includes(name),
      schema,
    })),
  ]
}

const json = (schema: Json) => ({ 'application/json': { schema } })

function responsesOf({ response, status }: Route): Json {
  const content = response === 'sent' ? {} : { content: json(schemaOf(response, 'output')) }
  const failure = { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } }
  return {
    [status]: { description: 'Done', ...content },
    default: { description: 'What went wrong', content: failure },
  }
}

function operationOf(route: Route): Json {
  const needed = actions[route.action]
  return {
    operationId: `${route.method} ${route.path}`,
    summary: route.summary,
    tags: [route.action.split('/')[0]],
    'x-action': route.action,
    'x-needs': needed,
    ...(needed === 'visitor' ? {} : { security: [{ session: [] }] }),
    parameters: parametersOf(route),
    ...(route.body ? { requestBody: { required: true, content: json(schemaOf(route.body, 'input')) } } : {}),
    responses: responsesOf(route),
  }
}

/** The description of the whole API, from the same routes that answer. */
export function openApi(routes: Route[], publicUrl: string, cookie: string): Json {
  const paths: Record<string, Json> = {}
  for (const route of routes) (paths[pathOf(route.path)] ??= {})[route.method] = operationOf(route)
  return {
    openapi: '3.0.3',
    info: { title: 'Basinbook', version: '1', description: 'SI units throughout; instants are UTC.' },
    servers: [{ url: publicUrl }],
    paths,
    components: {
      schemas: { Problem: schemaOf(problem, 'output') },
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: cookie } },
    },
  }
}
