import { isCode, type Rule, type SourceFile, type Violation } from './source-file.ts'

const longest = 400

export const filesAreShort: Rule = (files) =>
  files
    .filter(({ path }) => isCode(path) || /\.(css|py|R|sh)$/.test(path))
    .map(({ path, text }) => ({ path, lines: text.split('\n').length - 1 }))
    .filter(({ lines }) => lines > longest)
    .map(({ path, lines }) => ({ path, message: `has ${lines} lines, more than ${longest}: split it` }))

function matching(files: SourceFile[], pattern: RegExp, message: (found: string) => string): Violation[] {
  return files.flatMap(({ path, text }) => {
    const found = pattern.exec(text)
    return found ? [{ path, message: message(found[0].trim()) }] : []
  })
}

const htmlDirective = new RegExp(`\\sv-${'html'}(?=[\\s=>])`)

export const noHtmlStrings: Rule = (files) =>
  matching(
    files.filter(({ path }) => path.endsWith('.vue')),
    htmlDirective,
    (found) => `uses ${found}: names come from users, and HTML must not`,
  )

/** Written in pieces, so that this file does not say what it forbids. */
const workplace = [
  `\\.\\./shared/${'design'}(?!\\w)`,
  `/${'work'}/(?:main|shared|\\.)`,
  `\\.${'library'}/`,
  ...['methods', 'architecture', 'product', 'look', 'stack', 'interop'].map((name) => `\\b${name}\\.${'md'}\\b`),
  `registry\\.${'npmjs'}\\.org`,
]
const naming = new RegExp(workplace.join('|'))

/** What a stranger with a clone cannot open must not be referred to. The lock file names where packages come from. */
export const noWorkplace: Rule = (files) =>
  matching(
    files.filter(({ path }) => path !== 'package-lock.json'),
    naming,
    (found) => `names ${found}, which is no part of the project`,
  )

const topLevel = new Set([
  ...['src', 'server', 'shared', 'drizzle', 'tests', 'tiles', 'README.md', 'DEVELOPERS.md', 'index.html'],
  ...['package.json', 'package-lock.json', 'tsconfig.json', 'vite.config.ts', 'drizzle.config.ts', 'eslint.config.js'],
])

/** Names at the top of the project that have no place there; dot-files and what git ignores are left alone. */
export function strayEntries(names: string[], ignored: string): string[] {
  const notKept = new Set(ignored.split('\n').map((line) => line.trim().replace(/^\/|\/$/g, '')))
  return names.filter(
    (name) => !name.startsWith('.') && !topLevel.has(name) && !notKept.has(name) && !name.endsWith('.log'),
  )
}

/** Further compiler settings live in the folders they are for. */
export const settingsInPlace: Rule = (files) =>
  files
    .filter(
      ({ path }) =>
        /(^|\/)tsconfig[^/]*\.json$/.test(path) && !/^((src|server|shared|tests)\/)?tsconfig\.json$/.test(path),
    )
    .map(({ path }) => ({ path, message: 'compiler settings live in src, server, shared, tests and at the top' }))
