import { cpSync, mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { sql } from 'drizzle-orm'
import { migrate } from 'drizzle-orm/mysql2/migrator'
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest'
import { readPackedInputs } from '../../../server/api/analyses/packed-inputs.repository.ts'
import { unpackJson } from '../../../server/db/packed-json.ts'
import { connect } from '../../../server/db/client.ts'
import { analyses, wellCells } from '../../../server/db/schema/index.ts'
import { addToCells } from '../../../server/db/well-cells.ts'
import { databaseFolder } from '../../../server/setup/databases.mjs'
import { startMariadb, type Mariadb } from '../../../server/setup/mariadb.mjs'
import { inRoot } from '../../../server/setup/places.mjs'
import { run } from '../../../server/setup/processes.mjs'
import { bringUpToDate, knownMigrations, pendingMigrations } from '../../../server/setup/schema.mjs'
import { temporaryFolder } from '../../support/temporary.ts'

// Servers start and stop here, beside whatever else the machine does.
vi.setConfig({ testTimeout: 120_000, hookTimeout: 180_000 })

const dataDir = temporaryFolder()
let server: Mariadb

beforeAll(async () => {
  server = await startMariadb(databaseFolder(dataDir), { throwaway: true })
})
afterAll(async () => {
  await server.stop()
  rmSync(dataDir, { recursive: true })
})

/** Applies the first migration of the program alone, as its first version did. */
async function applyFirstMigration(url: string): Promise<void> {
  const folder = join(dataDir, 'first-migration')
  mkdirSync(join(folder, 'meta'), { recursive: true })
  const journal = JSON.parse(readFileSync(inRoot('drizzle/meta/_journal.json'), 'utf8'))
  const [first] = journal.entries
  writeFileSync(join(folder, 'meta/_journal.json'), JSON.stringify({ ...journal, entries: [first] }))
  cpSync(inRoot(`drizzle/${first.tag}.sql`), join(folder, `${first.tag}.sql`))
  const { db, close } = connect(url, 1)
  await migrate(db, { migrationsFolder: folder }).finally(close)
}

const snapshot = { version: 1, kind: 'reported', source: 'Brønn № 5 💧' }

const well = (code: string, mx: number, exposure: string) => `
  INSERT INTO wells (code, kind, position, mx, my, original_x, original_y, original_epsg, position_operation,
      position_accuracy_m, visibility, embargo_until, created_by, created_at)
    VALUES ('${code}', 'well', ST_PointFromText('POINT(-21.2 -38.4)', 4326), ${mx}, 10300001, 1, 2, 32727, 'none', 3,
      ${exposure}, '2026-01-02');`

const records = `
  ${well('V-1', 7400001, "'published', NULL, NULL")}
  ${well('V-2', 7400002, "'published', NULL, NULL")}
  ${well('V-3', 7400003, "'published', '2031-01-01', 7")}
  INSERT INTO analyses (pumping_test_id, method, method_version, state, inputs, inputs_sha256, result, created_at)
    VALUES (1, 'reported', 1, 'accepted', '${JSON.stringify(snapshot)}', repeat('0', 64), '{}', '2026-01-02');
  INSERT INTO users (email, name, role, created_at) VALUES ('a@b.example', 'Ada Ö. 🌊', 'analyst', '2026-01-02 03:04:05.678');
  INSERT INTO streams (name, stream_order, path, created_at)
    VALUES ('Brook', 2, ST_LineFromText('LINESTRING(-21.2 -38.4, -21.1 -38.3)', 4326), '2026-01-02');`

const readBack = `SELECT email, name, role, created_at FROM users; SELECT name, ST_AsText(path), ST_SRID(path) FROM streams`

describe('a data folder made by the first migration', () => {
  it('is brought up to date with its records as they were, after a dump', async () => {
    await applyFirstMigration(server.url())
    await server.query(records)
    const before = await server.query(readBack)
    const said: string[] = []
    const taken = await bringUpToDate(server.reach, server.url(), { dataDir, say: (line) => said.push(line) })

    expect(taken).toBe(knownMigrations().length - 1)
    expect(await server.query(readBack)).toEqual(before)
    expect(before).toContainEqual(['a@b.example', 'Ada Ö. 🌊', 'analyst', '2026-01-02 03:04:05.678'])
    const [dump = ''] = readdirSync(join(dataDir, 'backups'))
    expect(said.join()).toContain(dump)
    expect(await run('gzip', ['-dc', join(dataDir, 'backups', dump)])).toContain("'a@b.example'")
  })

  it('keeps what its analyses were made from, packed', async () => {
    const { db, close } = connect(server.url(), 1)
    const [row] = await db.select({ id: analyses.id }).from(analyses)
    expect(await unpackJson(await readPackedInputs(db, row!.id).finally(close))).toEqual(snapshot)
    const unpacked = 'SELECT CONVERT(UNCOMPRESS(bytes) USING utf8mb4) FROM analysis_input_parts'
    expect(await server.query(unpacked)).toEqual([[JSON.stringify(snapshot)]])
  })

  it('counts its wells by the cells of the map, as it does when they are written', async () => {
    const { db, close } = connect(server.url(), 1)
    const migrated = await db.select().from(wellCells)
    await db.delete(wellCells)
    await addToCells(db, sql`true`)
    const written = await db.select().from(wellCells).finally(close)
    expect(migrated).toEqual(written)
    expect(migrated.map(({ wellCount }) => wellCount).sort()).toEqual([1, 1, 1, 2, 2, 2])
  })

  it('has then the schema of a new one', async () => {
    await server.query('CREATE DATABASE basinbook_new', '')
    await bringUpToDate({ ...server.reach, database: 'basinbook_new' }, server.url('basinbook_new'), {
      dataDir,
      say: () => {},
    })
    const schemaOf = async (database: string) => {
      const text = await run('mariadb-dump', [...server.reach.args, '--no-data', '--compact', database])
      return text.replace(/ AUTO_INCREMENT=\d+/g, '')
    }
    const upgraded = await schemaOf('basinbook')
    expect(upgraded).toContain('SPATIAL KEY')
    expect(upgraded).toBe(await schemaOf('basinbook_new'))
  })

  it('is left alone when there is nothing to do', async () => {
    expect(await bringUpToDate(server.reach, server.url(), { dataDir, say: () => {} })).toBe(0)
    expect(readdirSync(join(dataDir, 'backups'))).toHaveLength(1)
  })

  it('is refused once a newer program has written it', async () => {
    await server.query("INSERT INTO __drizzle_migrations (hash, created_at) VALUES ('future', 9999999999999)")
    const attempt = bringUpToDate(server.reach, server.url(), { dataDir, say: () => {} })
    await expect(attempt).rejects.toThrow('written by a newer version of Basinbook')
  })
})

describe('what is pending', () => {
  const known = [
    { tag: 'a', when: 10 },
    { tag: 'b', when: 20 },
  ]
  it('is everything that a database has not had, in order', () => {
    expect(pendingMigrations([], known)).toEqual(known)
    expect(pendingMigrations([10], known)).toEqual([{ tag: 'b', when: 20 }])
    expect(pendingMigrations([10, 20], known)).toEqual([])
  })

  it('cannot be told for a database with a migration of another history', () => {
    expect(() => pendingMigrations([10, 15], known)).toThrow('newer version')
    expect(() => pendingMigrations([10, 20, 30], known)).toThrow('newer version')
  })
})
