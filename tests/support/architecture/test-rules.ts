import ts from 'typescript'
import { nodesIn, treeOf, type Rule, type SourceFile } from './source-file.ts'

const runners = new Set(['it', 'test', 'describe', 'suite', 'bench', 'ctx', 'context'])
const halted = new Set(['skip', 'only', 'todo', 'fixme', 'skipIf', 'runIf', 'fails', 'fail', 'slow'])
const crossedOut = new Set(['xit', 'xtest', 'xdescribe', 'fit', 'fdescribe'])

/** The name a chain begins with: `describe` of `describe.concurrent.each`. */
function beginning(node: ts.Expression): string {
  if (ts.isIdentifier(node)) return node.text
  if (ts.isPropertyAccessExpression(node) || ts.isCallExpression(node)) return beginning(node.expression)
  return ''
}

/** Calls only: a test about a runner may hold such words in its text. */
function heldBack(file: SourceFile): string[] {
  return nodesIn(treeOf(file)).flatMap((node) => {
    if (ts.isPropertyAccessExpression(node)) {
      return halted.has(node.name.text) && runners.has(beginning(node.expression)) ? [node.getText()] : []
    }
    if (!ts.isCallExpression(node) || !ts.isIdentifier(node.expression)) return []
    return crossedOut.has(node.expression.text) ? [node.expression.text] : []
  })
}

export const everyTestRuns: Rule = (files) =>
  files
    .filter(({ path }) => /^tests\/.*\.ts$/.test(path))
    .flatMap((file) => heldBack(file).map((call) => ({ path: file.path, message: `holds back a test with ${call}` })))
