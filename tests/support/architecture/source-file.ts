import { readdirSync, readFileSync } from 'node:fs'
import { extname, join, posix } from 'node:path'
import ts from 'typescript'

/** A text file of the project: its path from the top with forward slashes, and what it says. */
export interface SourceFile {
  path: string
  text: string
}

export interface Violation {
  path: string
  message: string
}

/** A rule looks at all files and names what breaks it. */
export type Rule = (files: SourceFile[]) => Violation[]

const textEndings = new Set(
  ['.ts', '.mjs', '.js', '.vue', '.css', '.html', '.json', '.md', '.py', '.R', '.sh', '.sql', '.csv', '.txt'].concat([
    '',
  ]),
)
const unread = new Set(['node_modules', 'dist', 'coverage', 'test-results', '.git', '.data', '.cache'])

/** Every text file under the top folder, without what is installed, built or kept as data. */
export function readProject(top: string, folder = ''): SourceFile[] {
  return readdirSync(join(top, folder), { withFileTypes: true }).flatMap((entry) => {
    const path = posix.join(folder, entry.name)
    if (entry.isDirectory()) return unread.has(entry.name) ? [] : readProject(top, path)
    if (!entry.isFile() || !textEndings.has(extname(entry.name))) return []
    return [{ path, text: readFileSync(join(top, path), 'utf8') }]
  })
}

export const isCode = (path: string) => /\.(ts|mjs|js|vue)$/.test(path)
export const isTypeScript = (path: string) => /\.(ts|vue)$/.test(path)

/** What a compiler sees: the whole file, or the script blocks of a component. */
export function scriptOf({ path, text }: SourceFile): string {
  if (!path.endsWith('.vue')) return text
  return [...text.matchAll(/<script[^>]*>([\s\S]*?)<\/script>/g)].map((block) => block[1]).join('\n')
}

const parsed = new WeakMap<SourceFile, ts.SourceFile>()

/** The syntax tree of a file, read once. */
export function treeOf(file: SourceFile): ts.SourceFile {
  const tree = parsed.get(file) ?? ts.createSourceFile(file.path, scriptOf(file), ts.ScriptTarget.ES2022, true)
  parsed.set(file, tree)
  return tree
}

/** Every node below one, itself included. */
export function nodesIn(node: ts.Node): ts.Node[] {
  const all: ts.Node[] = []
  const visit = (each: ts.Node) => {
    all.push(each)
    ts.forEachChild(each, visit)
  }
  visit(node)
  return all
}
