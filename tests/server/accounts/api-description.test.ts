import { beforeAll, describe, expect, it } from 'vitest'
import { z } from 'zod'
import { allRoutes } from '../../../server/api/index.ts'
import { createServices } from '../../../server/api/services.ts'
import { useApp } from '../../support/app.ts'

const test = useApp()

/** The shape that the OpenAPI 3.0.3 specification gives to the parts used here; every object is closed. */
const schemaObject = z.record(z.string(), z.unknown())
const content = z.record(z.string().regex(/^[a-z]+\/[a-z+]+$/), z.strictObject({ schema: schemaObject }))
const operation = z.strictObject({
  operationId: z.string().min(1),
  summary: z.string().min(1),
  tags: z.array(z.string()).min(1),
  'x-action': z.string(),
  'x-needs': z.string(),
  security: z.array(z.strictObject({ session: z.array(z.string()).length(0) })).optional(),
  parameters: z.array(
    z.strictObject({ name: z.string(), in: z.enum(['path', 'query']), required: z.boolean(), schema: schemaObject }),
  ),
  requestBody: z.strictObject({ required: z.literal(true), content }).optional(),
  responses: z.record(
    z.string().regex(/^([1-5]\d\d|default)$/),
    z.strictObject({ description: z.string().min(1), content: content.optional() }),
  ),
})
const document = z.strictObject({
  openapi: z.literal('3.0.3'),
  info: z.strictObject({ title: z.string(), version: z.string(), description: z.string() }),
  servers: z.array(z.strictObject({ url: z.url() })),
  paths: z.record(
    z.string().startsWith('/'),
    z.partialRecord(z.enum(['get', 'post', 'put', 'patch', 'delete']), operation),
  ),
  components: z.strictObject({
    schemas: z.record(z.string(), schemaObject),
    securitySchemes: z.record(
      z.string(),
      z.strictObject({ type: z.literal('apiKey'), in: z.literal('cookie'), name: z.string() }),
    ),
  }),
})

/** What JSON Schema has and OpenAPI 3.0 has not. */
const foreign = ['$schema', 'const', 'prefixItems', '$defs', 'propertyNames', 'patternProperties']

function keysIn(value: unknown): string[] {
  if (typeof value !== 'object' || value === null) return []
  return Object.entries(value).flatMap(([key, inner]) => [...(Array.isArray(value) ? [] : [key]), ...keysIn(inner)])
}

describe('the description of the API', () => {
  let described: z.infer<typeof document>
  beforeAll(async () => {
    const reader = await test.signIn('reader')
    described = document.parse((await reader.get('/api/openapi.json').expect(200)).body)
  })
  const operations = () =>
    Object.entries(described.paths).flatMap(([path, item]) =>
      Object.entries(item).map(([method, found]) => ({ path, method, ...found })),
    )

  it('tells every registered route once, by an id of its own', () => {
    const routes = allRoutes(createServices(test.deps), test.deps)
    const wanted = routes.map(({ method, path }) => `${method} ${path.replace(/:(\w+)/g, '{$1}')}`)
    expect(
      operations()
        .map(({ method, path }) => `${method} ${path}`)
        .sort(),
    ).toEqual(wanted.sort())
    expect(new Set(operations().map(({ operationId }) => operationId)).size).toBe(wanted.length)
  })

  it('declares exactly the parameters that stand in each path', () => {
    for (const { path, parameters } of operations()) {
      const inPath = parameters.filter((parameter) => parameter.in === 'path')
      expect(inPath.map(({ name }) => `{${name}}`)).toEqual(path.match(/\{\w+\}/g) ?? [])
      expect(inPath.every(({ required }) => required)).toBe(true)
    }
  })

  it('uses no word that OpenAPI 3.0 does not have, and no reference that leads nowhere', () => {
    expect(keysIn(described).filter((key) => foreign.includes(key))).toEqual([])
    const references = JSON.stringify(described).match(/"\$ref":"[^"]+"/g) ?? []
    expect(new Set(references)).toEqual(new Set(['"$ref":"#/components/schemas/Problem"']))
  })

  it('says what each needs, what goes in and what comes out', () => {
    const invite = described.paths['/api/people']!.post!
    expect(invite['x-needs']).toBe('administrator')
    expect(invite.security).toEqual([{ session: [] }])
    expect(invite.requestBody!.content['application/json']!.schema).toMatchObject({
      required: ['email', 'name', 'role'],
      properties: { role: { enum: ['reader', 'analyst', 'steward', 'administrator'] } },
    })
    expect(invite.responses['201']!.content!['application/json']!.schema.required).toContain('rowVersion')
    expect(described.paths['/api/session']!.post!.security).toBeUndefined()
  })
})
