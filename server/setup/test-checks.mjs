import { inRoot } from './places.mjs'

/**
 * What `npm test` runs. A check that counts its own tests writes {passed, failed, complaints} to the file named by
 * TEST_COUNTS; any other counts as one test.
 * @typedef {object} Check
 * @property {string} title
 * @property {string[]} args of Node
 * @property {boolean} [counts]
 */

const bin = (/** @type {string} */ path) => inRoot(`node_modules/${path}`)
const vueTsc = bin('vue-tsc/bin/vue-tsc.js')
const tsc = bin('typescript/bin/tsc')

/** Compilers, linter and seeding use one core each, so two run side by side. @type {Check[]} */
export const singleCore = [
  { title: 'Demo region and pages', args: ['--import', 'tsx', inRoot('tests/support/prepare-browser-tests.ts')] },
  { title: 'Types of the client', args: [vueTsc, '-p', 'src/tsconfig.json'] },
  { title: 'Types of the tests', args: [vueTsc, '-p', 'tests/tsconfig.json'] },
  { title: 'Types of the server', args: [tsc, '-p', 'server/tsconfig.json'] },
  { title: 'Types of the shared code', args: [tsc, '-p', 'shared/tsconfig.json'] },
  {
    title: 'Lint',
    args: [bin('eslint/bin/eslint.js'), '.', '--max-warnings=0', '--cache', '--cache-location', '.cache/eslint/'],
  },
]

/** These share the cores out by themselves. @type {Check[]} */
export const manyCores = [
  {
    title: 'Unit and API tests',
    args: [
      bin('vitest/vitest.mjs'),
      'run',
      '--allowOnly=false',
      '--retry=0',
      '--reporter=default',
      '--reporter=./tests/support/vitest-counts.ts',
    ],
    counts: true,
  },
  {
    title: 'Browser tests',
    args: [
      bin('@playwright/test/cli.js'),
      'test',
      '--config=tests/e2e/playwright.config.ts',
      '--forbid-only',
      '--retries=0',
      '--reporter=list,./tests/support/playwright-counts.ts',
    ],
    counts: true,
  },
]
