import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { afterAll, describe, expect, it, vi } from 'vitest'
import { inRoot } from '../../../server/setup/places.mjs'
import { manyCores, type Check } from '../../../server/setup/test-checks.mjs'
import { outcomeOf, runChecks, testEnvironment } from '../../../server/setup/test-run.mjs'

vi.setConfig({ testTimeout: 120_000 })

// Inside the project, where the test runners find their packages.
mkdirSync(inRoot('.cache'), { recursive: true })
const place = mkdtempSync(inRoot('.cache/counting-'))
afterAll(() => rmSync(place, { recursive: true }))

async function outcomesOf(checks: Check[]) {
  const said: string[] = []
  const stopping = new AbortController().signal
  const outcomes = await runChecks(checks, { atOnce: 2, stopping, say: (line) => said.push(line) })
  return { outcomes, said: said.join('\n') }
}

const makeScript = (title: string, script: string): Check => ({ title, args: ['-e', script] })

/** A check of `npm test` as it is, pointed at other tests. */
function redirected(title: string, file: string, content: string, change: (args: string[]) => string[]): Check {
  writeFileSync(join(place, file), content)
  const check = manyCores.find((candidate) => candidate.title === title)
  if (!check) throw new Error(`There is no check ${title}`)
  return { ...check, args: change(check.args) }
}

const tests = (from: string, retrying: string) => `
  import { ${from === 'vitest' ? 'describe, expect, it as test' : 'expect, test'} } from '${from}'
  ${from === 'vitest' ? '' : 'const { describe } = test'}
  let attempt = 0
  test('passes', () => {})
  test('fails', () => { expect(1).toBe(2) })
  test.skip('is skipped', () => {})
  ${retrying}
`

describe('a check that counts nothing itself', () => {
  it('is one test, and prints everything it said only when it fails', async () => {
    const { outcomes, said } = await outcomesOf([
      makeScript('Fine', 'console.log("quiet")'),
      makeScript('Broken', 'console.log("first"); console.error("last"); process.exitCode = 3'),
    ])
    expect(outcomes.map(({ passed, failed }) => [passed, failed]).sort()).toEqual([
      [0, 1],
      [1, 0],
    ])
    expect(said).toMatch(/first\s+last/)
    expect(said).toMatch(/Fine: passed in \d+\.\d s/)
    expect(said).toMatch(/Broken: FAILED in/)
    expect(said).not.toContain('quiet')
  })
})

describe('the tests that npm test counts', () => {
  it('have passed only at the first attempt and unskipped, in Vitest', async () => {
    const content = tests(
      'vitest',
      `test('passes later', { retry: 1 }, () => { expect(attempt++).toBe(1) }); test.todo('is to do')`,
    )
    const check = redirected('Unit and API tests', 'a.test.ts', content, (args) => [
      ...args.filter((arg) => arg !== '--retry=0'),
      `--root=${place}`,
      `--config=${writeConfig()}`,
    ])
    const { outcomes } = await outcomesOf([check])
    expect(outcomes).toEqual([
      {
        passed: 1,
        failed: 4,
        complaints: [
          'Failed: a.test.ts > fails',
          'Skipped: a.test.ts > is skipped',
          'Passed only when tried again: a.test.ts > passes later',
          'Skipped: a.test.ts > is to do',
        ],
      },
    ])
  })

  it('have passed only at the first attempt and unskipped, in the browser', async () => {
    const retrying = `describe(() => { describe.configure({ retries: 1 }); test('passes later', ({}, info) => { expect(info.retry).toBe(1) }) })`
    const check = redirected('Browser tests', 'b.spec.ts', tests('@playwright/test', retrying), (args) =>
      args.filter((arg) => !/^--(retries|config)/.test(arg)).concat(`--config=${writePlaywrightConfig()}`),
    )
    const { outcomes } = await outcomesOf([check])
    expect(outcomes[0]).toMatchObject({ passed: 1, failed: 3 })
    expect(outcomes[0]?.complaints.map((line) => line.split(':')[0])).toEqual([
      'Failed',
      'Skipped',
      'Passed only when tried again',
    ])
  })

  it('cannot be none', async () => {
    const check = redirected('Unit and API tests', 'c.none.ts', '', (args) => [
      ...args,
      'no-such-file',
      '--passWithNoTests',
      `--root=${place}`,
      `--config=${writeConfig()}`,
    ])
    const { outcomes } = await outcomesOf([check])
    expect(outcomes).toEqual([{ passed: 0, failed: 1, complaints: ['It found no tests.'] }])
  })
})

describe('a check whose tests all passed', () => {
  it('has failed when it ended badly all the same', () => {
    expect(outcomeOf(1, { passed: 9, failed: 0, complaints: [] })).toEqual({
      passed: 9,
      failed: 1,
      complaints: ['It ended with 1.'],
    })
  })
})

describe('the environment of the checks', () => {
  it('has nothing of an installation', () => {
    const env = {
      PATH: '/bin',
      DATABASE_URL: 'mysql://real',
      DATA_DIR: '/srv',
      DEMO: '0',
      S3_BUCKET: 'b',
      HOME: '/root',
    }
    expect(testEnvironment(env)).toEqual({ PATH: '/bin', HOME: '/root' })
  })
})

function writeConfig(): string {
  const file = join(place, 'vitest.config.mjs')
  writeFileSync(file, `export default { test: { include: ['*.test.ts'] } }`)
  return file
}

function writePlaywrightConfig(): string {
  const file = join(place, 'playwright.config.mjs')
  writeFileSync(
    file,
    `export default { testMatch: '*.spec.ts', testDir: ${JSON.stringify(place)}, outputDir: ${JSON.stringify(join(place, 'out'))} }`,
  )
  return file
}
