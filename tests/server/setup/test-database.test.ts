import mysql from 'mysql2/promise'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createDatabase, useDatabase } from '../../support/database.ts'

const database = useDatabase()
let connection: mysql.Connection

beforeAll(async () => {
  connection = await mysql.createConnection(database.url)
})
afterAll(() => connection.end())

const count = async (table: string) => {
  const [rows] = await connection.query<mysql.RowDataPacket[]>(`SELECT COUNT(*) AS n FROM ${table}`)
  return rows[0]?.n as number
}

describe('the database of a test file', () => {
  it('has every table of the schema and its migrations are recorded', async () => {
    expect(await count('users')).toBe(0)
    expect(await count('__drizzle_migrations')).toBeGreaterThan(0)
  })

  it('has the spatial indexes that only the migrations make', async () => {
    const [rows] = await connection.query<mysql.RowDataPacket[]>("SHOW INDEX FROM wells WHERE Index_type = 'SPATIAL'")
    expect(rows.map((row) => row.Column_name)).toEqual(['position'])
  })

  it('is not seen by another', async () => {
    const other = await createDatabase()
    const [rows] = await connection.query<mysql.RowDataPacket[]>('SHOW DATABASES')
    await connection.query("INSERT INTO leases (name, holder, expires_at) VALUES ('a', 'b', NOW())")
    const second = await mysql.createConnection(other.url)
    const [found] = await second.query<mysql.RowDataPacket[]>('SELECT * FROM leases')
    await second.end()
    await other.drop()
    expect(rows.length).toBeGreaterThan(2)
    expect(found).toEqual([])
  })
})
