import { sql } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { connect, type Connection } from '../../../server/db/client.ts'
import { packetProblem } from '../../../server/db/packet.ts'
import { startMariadb } from '../../support/database.ts'

let server: Awaited<ReturnType<typeof startMariadb>>
const connections: Connection[] = []

beforeAll(async () => {
  server = await startMariadb()
}, 120_000)
afterAll(async () => {
  await Promise.all(connections.map(({ close }) => close()))
  await server.remove()
})

/** The size holds for connections that are opened afterwards. */
async function withPacket(bytes: number) {
  await server.query(`SET GLOBAL max_allowed_packet = ${bytes}`)
  const connection = connect(server.url(), 1)
  connections.push(connection)
  return connection.db
}

describe('a database', () => {
  it('is enough as MariaDB comes, with statements of 16 MB', async () => {
    const db = await withPacket(16 * 1024 * 1024)
    expect(await packetProblem(db)).toBeNull()
    await expect(db.execute(sql`select length(${'x'.repeat(15_000_000)})`)).resolves.toBeDefined()
  })

  it('that takes shorter ones is told apart, with what to change', async () => {
    const problem = await packetProblem(await withPacket(4 * 1024 * 1024))
    expect(problem).toContain('4 MB at most')
    expect(problem).toContain('max_allowed_packet=16M')
  })
})
