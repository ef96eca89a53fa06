import { importsOf, type Import } from './imports.ts'
import { isTypeScript, type Rule, type SourceFile } from './source-file.ts'

/**
 * The only directions in which code may import: a folder sees the rows above its own, and itself.
 * Folders of one row do not see each other, except where named in `together`.
 */
const sharedOrder = [
  ['numerics', 'quantities'],
  ['geodesy'],
  ['readings', 'hydraulics', 'geostatistics'],
  ['estimates', 'imports'],
  ['words'],
  ['contracts', 'charts'],
]
const together: Record<string, string[]> = { charts: ['contracts'] }
/** Sentences name the types they speak of; nothing of a contract runs for them. */
const namedOnly: Record<string, string[]> = { words: ['contracts'] }

const clientOrder = [['api', 'assets', 'workers'], ['stores', 'composables'], ['components'], ['views', 'plugins']]
const clientTogether: Record<string, string[]> = { stores: ['composables'], composables: ['stores'] }

const rowOf = (order: string[][], folder: string) => order.findIndex((row) => row.includes(folder))

function sees(order: string[][], same: Record<string, string[]>, from: string, to: string): boolean {
  if (from === to || same[from]?.includes(to)) return true
  return rowOf(order, to) < rowOf(order, from)
}

const describe = (file: SourceFile, { target }: Import, why: string) => ({
  path: file.path,
  message: `imports ${target}: ${why}`,
})

/** Applies a check to each import of our own files. */
function eachImport(applies: (path: string) => boolean, check: (path: string, each: Import) => string | null): Rule {
  return (files) =>
    files
      .filter((file) => isTypeScript(file.path) && applies(file.path))
      .flatMap((file) =>
        importsOf(file).flatMap((each) => {
          const why = check(file.path, each)
          return why ? [describe(file, each, why)] : []
        }),
      )
}

const parts = (path: string) => path.split('/')

export const sharedDirection: Rule = eachImport(
  (path) => path.startsWith('shared/'),
  (path, { target, own, typeOnly }) => {
    if (!own) return null
    const [, from = ''] = parts(path)
    const [top, to = ''] = parts(target)
    if (top !== 'shared') return 'shared code knows neither page nor server'
    if (rowOf(sharedOrder, from) < 0) return `shared/${from} has no place in the order of folders`
    if (from === 'numerics' && to !== 'numerics') return 'numerics imports nothing of ours'
    if (typeOnly && namedOnly[from]?.includes(to)) return null
    return sees(sharedOrder, together, from, to) ? null : `${from} must not depend on ${to}`
  },
)

export const clientAndServerApart: Rule = eachImport(
  (path) => /^(src|server)\//.test(path),
  (path, { target, own }) => {
    const other = path.startsWith('src/') ? 'server' : 'src'
    return own && target.startsWith(`${other}/`) ? `${parts(path)[0]} and ${other} meet only in shared` : null
  },
)

/** Routes with their link builders, and the colours of the theme, are for everybody. */
const forEverybody = (path: string) => path.startsWith('src/router/') || path === 'src/plugins/tokens.ts'

/** What is mounted from the top is for the top alone. */
export const clientDirection: Rule = eachImport(
  (path) => path.startsWith('src/') && parts(path).length > 2 && !path.startsWith('src/router/'),
  (path, { target, own }) => {
    if (!own || !target.startsWith('src/') || forEverybody(target)) return null
    const [, from = ''] = parts(path)
    const [, to = ''] = parts(target)
    if (parts(target).length === 2) return 'only index.html and tests start the application'
    return sees(clientOrder, clientTogether, from, to) ? null : `${from} must not depend on ${to}`
  },
)

type Layer = 'repository' | 'service' | 'routes'

/** Files of a resource that are neither repository nor routes are its service, in one file or in several. */
function layerOf(path: string): Layer {
  if (path.endsWith('.repository.ts')) return 'repository'
  return path.endsWith('.routes.ts') ? 'routes' : 'service'
}

const height: Record<Layer, number> = { repository: 0, service: 1, routes: 2 }

/** The resource of a file in server/api; null for the files that mount them all. */
const resourceOf = (path: string) => /^server\/api\/([^/]+)\//.exec(path)?.[1] ?? null

export const serverLayers: Rule = eachImport(
  (path) => resourceOf(path) !== null,
  (path, { target, own, typeOnly }) => {
    const there = resourceOf(target)
    if (!own || there === null) return null
    const [from, to] = [layerOf(path), layerOf(target)]
    if (there !== resourceOf(path)) {
      const through = typeOnly || (to === 'service' && from !== 'repository')
      return through ? null : 'another resource is reached through its service only'
    }
    if (from === 'routes' && to === 'repository' && !typeOnly) return 'routes reach rows through the service'
    return height[to] <= height[from] || typeOnly ? null : `a ${from} must not depend on ${to}`
  },
)
