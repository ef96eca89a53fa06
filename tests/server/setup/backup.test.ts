import { existsSync, mkdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest'
import { databaseFolder } from '../../../server/setup/databases.mjs'
import { takeLock } from '../../../server/setup/locks.mjs'
import { startMariadb } from '../../../server/setup/mariadb.mjs'
import { lockFile } from '../../../server/setup/prepare.mjs'
import { run } from '../../../server/setup/processes.mjs'
import { runCommand } from '../../support/commands.ts'
import { createDatabase } from '../../support/database.ts'
import { migrated } from '../../support/database.migrated.ts'
import { copyOfTemplate } from '../../support/database.template.ts'
import { temporaryFolder } from '../../support/temporary.ts'

// Servers start and stop here, beside whatever else the machine does.
vi.setConfig({ testTimeout: 120_000, hookTimeout: 180_000 })

const place = temporaryFolder()
const archive = join(place, 'archive.tar.gz')
const source = join(place, 'source')
const target = join(place, 'target')
const bytes = Buffer.from([0, 255, 10, 13, 128, 39])

const records = `
  INSERT INTO users (email, name, role, created_at) VALUES ('a@b.example', 'O''Hara \\\\ Ö 🌊', 'reader', '2026-01-02 03:04:05.678');
  INSERT INTO streams (name, stream_order, path, created_at)
    VALUES ('Brook', 2, ST_LineFromText('LINESTRING(-21.2 -38.4, -21.1 -38.3)', 4326), '2026-01-02');
  INSERT INTO audit_trail (at, actor_name, action, subject, details) VALUES (NOW(3), 'x', 'y', 'z', '{"a":[1,"ß"]}');`
const readBack = `SELECT email, name, role, created_at FROM users; SELECT id, name, HEX(ST_AsWKB(path)), ST_SRID(path) FROM streams;
  SELECT * FROM audit_trail; SELECT * FROM __drizzle_migrations`

const inDatabase = async (dataDir: string, sql: string) => {
  const server = await startMariadb(databaseFolder(dataDir), { throwaway: true })
  return server.query(sql).finally(server.stop)
}

beforeAll(async () => {
  const copy = await copyOfTemplate(migrated)
  mkdirSync(join(source, 'storage/ab'), { recursive: true })
  await run('mv', [copy, databaseFolder(source)])
  writeFileSync(join(source, 'storage/ab/cd'), bytes)
  await inDatabase(source, records)
  await inDatabase(target, 'SELECT 1')
  expect(await runCommand('backup', [archive], { DATA_DIR: source })).toMatchObject({ status: 0 })
})
afterAll(() => rmSync(place, { recursive: true }))

describe('a backup', () => {
  it('is one private file that says what it holds', async () => {
    expect((statSync(archive).mode & 0o777).toString(8)).toBe('600')
    const manifest = JSON.parse(await run('tar', ['-xzOf', archive, 'manifest.json']))
    expect(manifest).toMatchObject({ format: 'basinbook-backup', version: 1, storage: 'folder' })
    expect(manifest.schema.length).toBeGreaterThan(0)
  })

  it('comes back whole in an empty data folder: records, geometry, text and files', async () => {
    const restored = await runCommand('restore', [archive], { DATA_DIR: target })
    expect(restored).toMatchObject({ status: 0, output: expect.stringContaining('Restored.') })
    const before = await inDatabase(source, readBack)
    expect(before.length).toBeGreaterThan(3)
    expect(await inDatabase(target, readBack)).toEqual(before)
    expect(readFileSync(join(target, 'storage/ab/cd'))).toEqual(bytes)
  })

  it('replaces present data only when told to, and keeps what was there', async () => {
    await inDatabase(target, "UPDATE users SET name = 'changed'; CREATE TABLE extra (n INT)")
    const refused = await runCommand('restore', [archive], { DATA_DIR: target })
    expect(refused).toMatchObject({ status: 1, output: expect.stringContaining('--replace') })
    expect(await inDatabase(target, 'SELECT name FROM users')).toEqual([['changed']])

    expect(await runCommand('restore', [archive, '--replace'], { DATA_DIR: target })).toMatchObject({ status: 0 })
    expect(await inDatabase(target, readBack)).toEqual(await inDatabase(source, readBack))
    expect(await inDatabase(target, "SHOW TABLES LIKE 'extra'")).toEqual([])
    const [kept = ''] = (await run('ls', [join(target, 'backups')])).match(/before-restore-\S+/) ?? []
    expect(await run('gzip', ['-dc', join(target, 'backups', kept)])).toContain("'changed'")
    expect(readFileSync(join(target, 'backups/storage-before-restore/ab/cd'))).toEqual(bytes)
  })

  it('is not restored into a folder that a running process uses', async () => {
    const release = takeLock(lockFile(target), 'run', () => '')
    const refused = await runCommand('restore', [archive, '--replace'], { DATA_DIR: target })
    release()
    expect(refused.status).toBe(1)
    expect(refused.output).toContain(`in use by process ${process.pid}`)
  })

  it('of a newer program is refused before anything is touched', async () => {
    const newer = join(place, 'newer')
    mkdirSync(newer)
    await run('tar', ['-xzf', archive, '-C', newer])
    const manifest = JSON.parse(readFileSync(join(newer, 'manifest.json'), 'utf8'))
    writeFileSync(
      join(newer, 'manifest.json'),
      JSON.stringify({ ...manifest, schema: [...manifest.schema, 9999999999999] }),
    )
    await run('tar', ['-czf', join(place, 'newer.tar.gz'), '-C', newer, 'manifest.json', 'database.sql.gz'])
    const refused = await runCommand('restore', [join(place, 'newer.tar.gz'), '--replace'], { DATA_DIR: target })
    expect(refused).toMatchObject({ status: 1, output: expect.stringContaining('newer version of Basinbook') })
    expect(existsSync(join(target, 'storage'))).toBe(true)
  })

  it.each([
    ['text', 'not an archive at all'],
    ['nothing', ''],
  ])('is told from a file that holds %s', async (_what, content) => {
    const file = join(place, 'wrong.tar.gz')
    writeFileSync(file, content)
    const refused = await runCommand('restore', [file], { DATA_DIR: join(place, 'never') })
    expect(refused.status).toBe(1)
    expect(refused.output).toMatch(/damaged or no backup|not a backup/)
  })

  it('moves between a database of our own and one at DATABASE_URL', async () => {
    const remote = await createDatabase()
    const env = { DATABASE_URL: remote.url, DATA_DIR: join(place, 'remote') }
    expect(await runCommand('restore', [archive, '--replace'], env)).toMatchObject({ status: 0 })
    const again = join(place, 'again.tar.gz')
    expect(await runCommand('backup', [again], env)).toMatchObject({ status: 0 })
    await remote.drop()
    expect(await runCommand('restore', [again, '--replace'], { DATA_DIR: target })).toMatchObject({ status: 0 })
    expect(await inDatabase(target, readBack)).toEqual(await inDatabase(source, readBack))
    expect(readFileSync(join(target, 'storage/ab/cd'))).toEqual(bytes)
  })
})
