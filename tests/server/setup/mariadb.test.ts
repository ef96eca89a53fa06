import { once } from 'node:events'
import { existsSync, mkdirSync, rmSync, statSync } from 'node:fs'
import { createServer } from 'node:net'
import { dirname, join } from 'node:path'
import mysql from 'mysql2/promise'
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest'
import { readAccess } from '../../../server/setup/mariadb-files.mjs'
import { startMariadb, type Mariadb } from '../../../server/setup/mariadb.mjs'
import { isAlive } from '../../../server/setup/processes.mjs'
import { temporaryFolder } from '../../support/temporary.ts'

// Servers start and stop here, beside whatever else the machine does.
vi.setConfig({ testTimeout: 120_000, hookTimeout: 180_000 })

const place = temporaryFolder()
const folder = join(place, 'database')
let server: Mariadb

beforeAll(async () => {
  server = await startMariadb(folder, { throwaway: true })
  await server.query('CREATE TABLE kept (n INT PRIMARY KEY); INSERT INTO kept VALUES (7)')
})
afterAll(async () => {
  await server.stop()
  rmSync(place, { recursive: true })
})

const modeOf = (path: string) => (statSync(path).mode & 0o777).toString(8)
const kept = async () => (await server.query('SELECT n FROM kept')).flat()

async function signIn(user: string, password: string): Promise<string> {
  try {
    const connection = await mysql.createConnection({ host: '127.0.0.1', port: server.port, user, password })
    await connection.end()
    return 'let in'
  } catch (error) {
    return (error as { code: string }).code
  }
}

describe('a first start', () => {
  it('keeps the password where only its owner reads it', () => {
    expect(modeOf(join(folder, 'access.json'))).toBe('600')
    expect(modeOf(folder)).toBe('700')
    expect(server.password).toMatch(/^[0-9a-f]{48}$/)
  })

  it('lets the application in with its password alone', async () => {
    expect(await signIn(server.user, server.password)).toBe('let in')
    expect(await signIn(server.user, 'a guess')).toBe('ER_ACCESS_DENIED_ERROR')
    expect(await signIn(server.user, '')).toBe('ER_ACCESS_DENIED_ERROR')
  })

  it.each(['root', 'mysql', ''])('lets nobody in over the network as %j', async (user) => {
    for (const password of ['', 'invalid', server.password]) expect(await signIn(user, password)).not.toBe('let in')
  })

  it('gives the application its own databases and nothing of the server', async () => {
    const connection = await mysql.createConnection(server.url())
    const [databases] = await connection.query<mysql.RowDataPacket[]>('SHOW DATABASES')
    await expect(connection.query('SELECT * FROM mysql.global_priv')).rejects.toMatchObject({
      code: 'ER_TABLEACCESS_DENIED_ERROR',
    })
    await connection.end()
    expect(databases.map((row) => row.Database)).toEqual(['basinbook', 'information_schema'])
  })

  it('keeps time in UTC and text in utf8mb4', async () => {
    expect(await server.query('SELECT @@time_zone, @@character_set_database, @@bind_address')).toEqual([
      ['+00:00', 'utf8mb4', '127.0.0.1'],
    ])
  })
})

describe('a later start', () => {
  it('finds its data, port and password again after an orderly stop', async () => {
    const { port, password } = server
    await server.stop()
    server = await startMariadb(folder, { throwaway: true })
    expect([server.port, server.password]).toEqual([port, password])
    expect(await signIn(server.user, password)).toBe('let in')
    expect(await kept()).toEqual(['7'])
  })

  it('finds what was committed before the server was killed', async () => {
    await server.query('INSERT INTO kept VALUES (8)')
    await server.kill()
    server = await startMariadb(folder, { throwaway: true })
    expect(await kept()).toEqual(['7', '8'])
  })

  it('replaces a server that still runs on the folder', async () => {
    const before = server
    server = await startMariadb(folder, { throwaway: true })
    expect(await before.ended).toBe(0)
    expect(isAlive(before.pid)).toBe(false)
    expect(server.pid).not.toBe(before.pid)
    expect(await kept()).toEqual(['7', '8'])
  })

  it('takes another port when the last one is taken by another program, and records it', async () => {
    const { port } = server
    await server.stop()
    const other = createServer().listen(port, '127.0.0.1')
    await once(other, 'listening')
    server = await startMariadb(folder, { throwaway: true })
    other.close()
    expect(server.port).not.toBe(port)
    expect(readAccess(folder)?.port).toBe(server.port)
    expect(await signIn(server.user, server.password)).toBe('let in')
  })
})

describe('a folder with a long path, where a first start was interrupted', () => {
  it('gets a server whose socket has a short path, in a place of its own that goes away', async () => {
    const long = join(place, 'x'.repeat(110))
    mkdirSync(join(long, 'data.new', 'half'), { recursive: true })
    const other = await startMariadb(long, { throwaway: true })
    expect(other.socket.length).toBeLessThan(108)
    expect(modeOf(dirname(other.socket))).toBe('700')
    expect(await other.query('SELECT 1')).toEqual([['1']])
    await other.stop()
    expect(existsSync(dirname(other.socket))).toBe(false)
    expect(existsSync(join(long, 'data.new'))).toBe(false)
  })
})
