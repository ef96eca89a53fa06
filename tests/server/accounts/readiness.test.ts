import { sql } from 'drizzle-orm'
import request from 'supertest'
import { describe, expect, it } from 'vitest'
import { useApp } from '../../support/app.ts'

const test = useApp()
const ready = () => request(test.app).get('/readyz')

describe('readiness', () => {
  it('is told once the database answers at this program’s version, outside a cluster', async () => {
    await ready().expect(200, { ready: true, cluster: 'none' })
  })

  it('is refused while the database is older than the program, newer, or empty', async () => {
    const { db } = test.deps.connection
    for (const change of [
      sql`update __drizzle_migrations set created_at = created_at - 1`,
      sql`update __drizzle_migrations set created_at = created_at + 2`,
      sql`drop table __drizzle_migrations`,
    ]) {
      await db.execute(change)
      const answer = await ready()
      expect(answer.body).toMatchObject({ status: 503, code: 'server/not-ready' })
      expect(answer.body.detail).toContain('version of this program')
    }
  })
})
