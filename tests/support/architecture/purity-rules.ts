import { builtinModules } from 'node:module'
import ts from 'typescript'
import { importsOf } from './imports.ts'
import { nodesIn, treeOf, type Rule, type SourceFile } from './source-file.ts'

/** Packages that shared code may use: pure, and running in Node and in a browser. */
const purePackages = new Set([
  ...['geographiclib-geodesic', 'kdbush', 'luxon', 'ml-matrix', 'papaparse', 'proj4', 'pure-rand', 'zod'],
  ...['@turf/turf', 'echarts'],
])
const ambient = new Set([
  ...['window', 'document', 'navigator', 'localStorage', 'sessionStorage', 'fetch', 'XMLHttpRequest', 'WebSocket'],
  ...['process', 'Buffer', 'require', '__dirname', 'console', 'setTimeout', 'setInterval', 'performance', 'crypto'],
])
const packageOf = (target: string) =>
  target
    .split('/')
    .slice(0, target.startsWith('@') ? 2 : 1)
    .join('/')
const isBuiltin = (target: string) => target.startsWith('node:') || builtinModules.includes(packageOf(target))

/** A name that stands for itself, not a property, a key or a declaration of ours. */
function isFreeName(node: ts.Identifier): boolean {
  const { parent } = node
  if (ts.isPropertyAccessExpression(parent)) return parent.expression === node
  return ts.isCallExpression(parent) || ts.isNewExpression(parent) || ts.isBinaryExpression(parent)
}

const chance = /^(Math\.random|Date\.now)$/
/** `DateTime.local(2024, 5, 1)` builds a time; without arguments it asks the clock. */
const clock = /^DateTime\.(now|local|utc)$/

function impurity(node: ts.Node): string | null {
  if (ts.isPropertyAccessExpression(node)) {
    const text = node.getText()
    if (chance.test(text)) return text
    const called = ts.isCallExpression(node.parent) && node.parent.arguments.length > 0
    return clock.test(text) && !called ? text : null
  }
  if (ts.isNewExpression(node)) return /^new Date(\(\))?$/.test(node.getText()) ? node.getText() : null
  return ts.isIdentifier(node) && ambient.has(node.text) && isFreeName(node) && !isDeclared(node) ? node.text : null
}

/** A parameter or constant may be called `document` or `process`. */
function isDeclared(name: ts.Identifier): boolean {
  return nodesIn(name.getSourceFile()).some(
    (node) =>
      (ts.isVariableDeclaration(node) ||
        ts.isParameter(node) ||
        ts.isBindingElement(node) ||
        ts.isImportSpecifier(node)) &&
      node.name.getText() === name.text,
  )
}

function inFile(file: SourceFile): string[] {
  const outside = importsOf(file).filter(({ own }) => !own)
  const builtins = outside.filter(({ target }) => isBuiltin(target)).map(({ target }) => `imports ${target} of Node`)
  const unknown = outside
    .filter(({ target }) => !isBuiltin(target) && !purePackages.has(packageOf(target)))
    .map(({ target }) => `imports ${target}, which is not on the list of pure packages`)
  const used = nodesIn(treeOf(file)).flatMap((node) => impurity(node) ?? [])
  return [
    ...builtins,
    ...unknown,
    ...used.map((name) => `uses ${name}: no page, machine, clock or chance in shared code`),
  ]
}

export const sharedIsPure: Rule = (files) =>
  files
    .filter(({ path }) => /^shared\/.*\.ts$/.test(path))
    .flatMap((file) => inFile(file).map((message) => ({ path: file.path, message })))
