import ts from 'typescript'
import { importsOf } from './imports.ts'
import { nodesIn, treeOf, type Rule, type SourceFile } from './source-file.ts'

const holdsSql = (path: string) =>
  path.endsWith('.repository.ts') ||
  /^server\/(db|jobs|setup)\//.test(path) ||
  /^server\/middleware\/.*store\.ts$/.test(path)

const statement = /^\s*(select\s[\s\S]+\sfrom\s|insert\s+into\s|update\s+\S+\s+set\s|delete\s+from\s|replace\s+into\s)/i

function sqlTexts(file: SourceFile): string[] {
  return nodesIn(treeOf(file)).flatMap((node) => {
    const isText = ts.isStringLiteral(node) || ts.isNoSubstitutionTemplateLiteral(node) || ts.isTemplateExpression(node)
    const text = isText ? node.getText().slice(1, -1) : ''
    return statement.test(text) ? [text.slice(0, 60)] : []
  })
}

/** Query building, table definitions and SQL text stay in repositories and in the folders that are about the database. */
export const sqlInRepositories: Rule = (files) =>
  files
    .filter(({ path }) => /^server\/.*\.ts$/.test(path) && !holdsSql(path))
    .flatMap((file) => {
      const packages = importsOf(file).filter(({ target }) => /^(drizzle-orm|mysql2)(\/|$)/.test(target))
      const tables = importsOf(file).filter(
        ({ target, typeOnly }) => target.startsWith('server/db/schema/') && !typeOnly,
      )
      const imported = [...packages, ...tables].map(({ target }) => `imports ${target}: queries belong in a repository`)
      const written = sqlTexts(file).map((text) => `holds SQL ("${text}"): it belongs in a repository`)
      return [...imported, ...written].map((message) => ({ path: file.path, message }))
    })

const guarded = '(?:wells|pumpingTests|pumping_tests|attachments)'
const reads = new RegExp(
  [
    `\\.(?:from|\\w*[jJ]oin|\\$count)\\(\\s*${guarded}\\b`,
    `\\balias\\(\\s*${guarded}\\b`,
    `\\bquery\\.${guarded}\\b`,
    `\\b(?:from|join)\\s+(?:\\$\\{\\s*)?\`?${guarded}\\b`,
  ].join('|'),
)
/** `@everyRow why`, in the comment above a function: a job or a write that must see every row, whoever asks. */
const marker = /@everyRow\s+\S.{14,}/

const writesWells = /\.(?:insert|update|delete)\(\s*wells\b/
const keepsCells = /\b(?:addToCells|recountingWells)\b/

interface Declaration {
  name: string
  /** Without comments, which may speak of tables. */
  code: string
  exported: boolean
  marked: boolean
}

const withoutComments = (node: ts.Node) => node.getText().replace(/\/\*[\s\S]*?\*\/|(?<=^|\s)\/\/.*$/gm, '')

function nameOf(statementNode: ts.Statement): string {
  if (ts.isFunctionDeclaration(statementNode) || ts.isClassDeclaration(statementNode))
    return statementNode.name?.text ?? ''
  if (!ts.isVariableStatement(statementNode)) return ''
  return statementNode.declarationList.declarations.map(({ name }) => name.getText()).join(' ')
}

function declarations(file: SourceFile): Declaration[] {
  const tree = treeOf(file)
  return tree.statements
    .filter((each) => !ts.isImportDeclaration(each))
    .map((each) => ({
      name: nameOf(each),
      code: withoutComments(each),
      exported: /^export\b/.test(each.getText()),
      marked: marker.test(each.getFullText()),
    }))
}

const mentions = (code: string, name: string) => name !== '' && new RegExp(`\\b${name}\\b`).test(code)

/**
 * The declarations that call `readable`, themselves or through another one of the file, and those that only such
 * declarations use: a common beginning of several queries.
 */
function guardedDeclarations(all: Declaration[]): Set<Declaration> {
  const safe = new Set(all.filter(({ code }) => /\breadable\b/.test(code)))
  const users = (each: Declaration) => all.filter((other) => other !== each && mentions(other.code, each.name))
  const calls = (each: Declaration) => [...safe].some((other) => other !== each && mentions(each.code, other.name))
  const onlyForSafe = (each: Declaration) =>
    !each.exported && users(each).length > 0 && users(each).every((other) => safe.has(other) || other.marked)
  grow(safe, all, calls)
  grow(safe, all, onlyForSafe)
  return safe
}

function grow<T>(found: Set<T>, all: T[], belongs: (each: T) => boolean) {
  for (let before = -1; before < found.size;) {
    before = found.size
    all.filter(belongs).forEach((each) => found.add(each))
  }
}

/** Every read of wells, pumping tests and attachments goes through `readable(viewer)`. */
export const readsAreGuarded: Rule = (files) =>
  files
    .filter(({ path }) => /^server\/.*\.ts$/.test(path) && !/^server\/(db|setup)\//.test(path))
    .flatMap((file) => {
      const all = declarations(file)
      const safe = guardedDeclarations(all)
      return all
        .filter((each) => reads.test(each.code) && !each.marked && !safe.has(each))
        .map((each) => ({
          path: file.path,
          message: `${each.name || 'a statement'} reads wells, pumping tests or attachments without readable(viewer)`,
        }))
    })

/** The map counts wells by cells, which are written with the wells. */
export const wellsAreCounted: Rule = (files) =>
  files
    .filter(({ path }) => /^server\/.*\.ts$/.test(path))
    .flatMap((file) =>
      declarations(file)
        .filter(({ code }) => writesWells.test(code) && !keepsCells.test(code))
        .map(({ name }) => ({
          path: file.path,
          message: `${name || 'a statement'} writes wells without the cells of the map (server/db/well-cells.ts)`,
        })),
    )
