import { posix } from 'node:path'
import ts from 'typescript'
import { nodesIn, treeOf, type SourceFile } from './source-file.ts'

export interface Import {
  /** Path from the top for our own files, the specifier for packages. */
  target: string
  own: boolean
  /** Erased by the compiler: nothing of the target runs. */
  typeOnly: boolean
}

function resolve(from: string, specifier: string): Pick<Import, 'target' | 'own'> {
  if (specifier.startsWith('#shared/')) return { target: specifier.slice(1), own: true }
  if (specifier.startsWith('.')) return { target: posix.join(posix.dirname(from), specifier), own: true }
  return { target: specifier, own: false }
}

const namesOnlyTypes = (bindings: ts.NamedImportBindings | undefined) =>
  bindings !== undefined &&
  ts.isNamedImports(bindings) &&
  bindings.elements.length > 0 &&
  bindings.elements.every((element) => element.isTypeOnly)

function isTypeOnly(node: ts.ImportDeclaration | ts.ExportDeclaration): boolean {
  if (ts.isExportDeclaration(node)) return node.isTypeOnly
  const clause = node.importClause
  if (!clause) return false
  return clause.isTypeOnly || (!clause.name && namesOnlyTypes(clause.namedBindings))
}

function specifierOf(node: ts.Node): { specifier: ts.Node; typeOnly: boolean } | null {
  if ((ts.isImportDeclaration(node) || ts.isExportDeclaration(node)) && node.moduleSpecifier) {
    return { specifier: node.moduleSpecifier, typeOnly: isTypeOnly(node) }
  }
  if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument)) {
    return { specifier: node.argument.literal, typeOnly: true }
  }
  if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword && node.arguments[0]) {
    return { specifier: node.arguments[0], typeOnly: false }
  }
  return null
}

const found = new WeakMap<SourceFile, Import[]>()

/** What a file imports: statements, re-exports, `import()` and `import('…')` types. */
export function importsOf(file: SourceFile): Import[] {
  const known = found.get(file)
  if (known) return known
  const imports = nodesIn(treeOf(file)).flatMap((node) => {
    const each = specifierOf(node)
    if (!each || !ts.isStringLiteralLike(each.specifier)) return []
    return [{ ...resolve(file.path, each.specifier.text), typeOnly: each.typeOnly }]
  })
  found.set(file, imports)
  return imports
}
