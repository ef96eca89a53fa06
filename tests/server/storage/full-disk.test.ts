import { writeFile } from 'node:fs/promises'
import express from 'express'
import { pinoHttp } from 'pino-http'
import request from 'supertest'
import { describe, expect, it } from 'vitest'
import { connect } from '../../../server/db/client.ts'
import { sendProblem } from '../../../server/middleware/problem.ts'
import { useDatabase } from '../../support/database.ts'

const database = useDatabase()

/** A table that holds its rows in the little memory it is given fills up as one on a full disk does. */
async function fillTable() {
  const { pool, close } = connect(database.url, 1)
  try {
    await pool.query('SET max_heap_table_size = 16384')
    await pool.query('CREATE TABLE filling (text CHAR(255) NOT NULL) ENGINE = MEMORY')
    for (;;) await pool.query("INSERT INTO filling VALUES ('x')")
  } finally {
    await close()
  }
}

/** Linux keeps a file that is always full. */
const fillFile = () => writeFile('/dev/full', 'x')

const answering = (work: () => Promise<void>) => {
  const app = express()
  app.use(pinoHttp({ enabled: false }))
  app.post('/', work)
  app.use(sendProblem)
  return request(app).post('/')
}

describe('a full disk', () => {
  it.each([
    ['under the tables', fillTable],
    ['under the files', fillFile],
  ])('%s is told as what it is, with what to do', async (_where, work) => {
    const { status, body } = await answering(work)
    expect({ status, code: body.code }).toEqual({ status: 507, code: 'server/full' })
    expect(body.detail).toMatch(/no room left on its disk.*Nothing was saved.*make room/)
  })
})
