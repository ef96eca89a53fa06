import { rmSync, statSync } from 'node:fs'
import { join } from 'node:path'
import { afterAll, describe, expect, it } from 'vitest'
import { missingPackages } from '../../../server/setup/debian.mjs'
import { CommandFailed, explain } from '../../../server/setup/problem.mjs'
import { childEnvironment, prepareDataFolder, readSettings } from '../../../server/setup/settings.mjs'
import { temporaryFolder } from '../../support/temporary.ts'

const place = temporaryFolder()
afterAll(() => rmSync(place, { recursive: true }))

const systemError = (code: string) => Object.assign(new Error(`${code}: it did not work`), { code })

describe('an error that people can do something about', () => {
  it.each([
    [systemError('ENOSPC'), 'disk is full'],
    [systemError('EADDRINUSE'), 'PORT=8090 npm start'],
    [systemError('EACCES'), 'DATA_DIR='],
    [systemError('EROFS'), 'read-only'],
    [new CommandFailed('npm ci', 1, 'npm error nospc ENOSPC: no space left on device, write'), 'disk is full'],
    [new CommandFailed('tar', 2, 'tar: x: Cannot write: No space left on device'), 'disk is full'],
  ])('%s is told with its remedy and the original words', (error, remedy) => {
    expect(explain(error)).toContain(remedy)
    expect(explain(error)).toContain(error.message)
  })

  it('keeps its stack when nobody foresaw it', () => {
    expect(explain(new TypeError('unforeseen'))).toContain('problem.test.ts')
  })
})

describe('a data folder', () => {
  it('is made for its owner alone', () => {
    const folder = join(place, 'a/b')
    prepareDataFolder(folder)
    expect((statSync(folder).mode & 0o777).toString(8)).toBe('700')
  })

  it('on a disk without room is refused, saying how much there is and what to do', () => {
    expect(() => prepareDataFolder(join(place, 'full'), 1e18)).toThrow(/has \d+ MB left.*DATA_DIR=/)
  })
})

describe('the settings that are read before the packages are there', () => {
  it.each([
    [{}, true],
    [{ DEMO: '0' }, false],
    [{ DEMO: 'false' }, false],
    [{ DATABASE_URL: 'mysql://a@b/c' }, false],
    [{ DATABASE_URL: 'mysql://a@b/c', DEMO: '1' }, true],
    [{ DATABASE_URL: ' ' }, true],
  ])('for %j say whether the demo region is wanted: %s', (env, demo) => {
    const settings = readSettings(env)
    expect(settings.demo).toBe(demo)
    expect(childEnvironment(env, settings, 'mysql://x').DEMO).toBe(demo ? '1' : '0')
  })

  it('give the application the address that its driver knows', () => {
    expect(readSettings({ DATABASE_URL: 'mariadb://a@b/c' }).databaseUrl).toBe('mysql://a@b/c')
  })
})

describe('a Debian package', () => {
  it('that is there is not missing', () => {
    expect(missingPackages(['mariadb-server-core', 'mariadb-client'])).toEqual([])
    expect(missingPackages(['no-such-package-anywhere'])).toEqual(['no-such-package-anywhere'])
  })
})
