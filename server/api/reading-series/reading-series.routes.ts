import { z } from 'zod'
import { idInPath, nothing } from '#shared/contracts/common.ts'
import {
  readingDecision,
  readingRowQuery,
  readingRows,
  seriesCreated,
  seriesDeletion,
  seriesForm,
} from '#shared/contracts/reading-series.ts'
import type { Deps } from '../../deps.ts'
import { onceOf } from '../idempotency/once.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'
import { createTurns } from './turns.ts'
import { readLogFile, takeLogFile, uploadFolder } from './upload.ts'

const params = z.object({ id: idInPath })
const one = '/api/reading-series/:id'

export function readingSeriesRoutes({ readingSeries }: Services, deps: Deps): Route[] {
  // More logs than threads to read them would only wait in memory, some 100 MB each.
  const inTurn = createTurns(deps.config.workerThreads)
  return [
    route(
      {
        method: 'post',
        path: '/api/pumping-tests/:id/reading-series',
        action: 'pumping-tests/edit',
        summary: 'Upload the readings of one well of a test',
        limit: 'upload',
        before: [takeLogFile(uploadFolder(deps.config))],
        params,
        body: seriesForm,
        response: seriesCreated,
        status: 201,
      },
      ({ viewer, params: { id }, body: { request }, req }) =>
        inTurn(async () => {
          const file = await readLogFile(req)
          const known = { request, name: file.name, size: file.bytes.length }
          return readingSeries.create(viewer, id, file, request, onceOf(deps, { viewer, req, body: known }))
        }),
    ),
    route(
      {
        method: 'get',
        path: `${one}/rows`,
        action: 'pumping-tests/read',
        summary: 'Lines of an uploaded log and what became of each',
        params,
        query: readingRowQuery,
        response: readingRows,
      },
      ({ viewer, params: { id }, query }) => readingSeries.rows(viewer, id, query),
    ),
    route(
      {
        method: 'get',
        path: `${one}/file`,
        action: 'pumping-tests/read',
        summary: 'An uploaded log as it came',
        params,
        response: 'sent',
      },
      async ({ viewer, params: { id }, res }) => {
        const { name, bytes } = await readingSeries.file(viewer, id)
        res.attachment(name).type('application/octet-stream').send(Buffer.from(bytes))
      },
    ),
    route(
      {
        method: 'post',
        path: `${one}/decisions`,
        action: 'pumping-tests/edit',
        summary: 'Leave readings out, or take them back, with a reason',
        params,
        body: readingDecision,
        response: nothing,
      },
      ({ viewer, params: { id }, body }) => readingSeries.decide(viewer, id, body),
    ),
    route(
      {
        method: 'delete',
        path: one,
        action: 'pumping-tests/edit',
        summary: 'Delete an uploaded log',
        params,
        query: seriesDeletion,
        response: nothing,
      },
      ({ viewer, params: { id }, query: { rowVersion } }) => readingSeries.remove(viewer, id, rowVersion),
    ),
  ]
}
