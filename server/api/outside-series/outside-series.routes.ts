import { z } from 'zod'
import { idInPath, nothing } from '#shared/contracts/common.ts'
import {
  outsideCreated,
  outsideDeletion,
  outsideForm,
  outsideRowQuery,
  outsideRows,
  outsideValues,
} from '#shared/contracts/outside-series.ts'
import type { Deps } from '../../deps.ts'
import { onceOf } from '../idempotency/once.ts'
import { createTurns } from '../reading-series/turns.ts'
import { readLogFile, takeLogFile, uploadFolder } from '../reading-series/upload.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

const params = z.object({ id: idInPath })
const one = '/api/outside-series/:id'

export function outsideSeriesRoutes({ outsideSeries }: Services, deps: Deps): Route[] {
  const inTurn = createTurns(deps.config.workerThreads)
  return [
    route(
      {
        method: 'post',
        path: '/api/pumping-tests/:id/outside-series',
        action: 'pumping-tests/edit',
        summary: 'Upload air pressure, a river stage or a tide gauge that readings of a test are corrected by',
        limit: 'upload',
        before: [takeLogFile(uploadFolder(deps.config))],
        params,
        body: outsideForm,
        response: outsideCreated,
        status: 201,
      },
      ({ viewer, params: { id }, body: { request }, req }) =>
        inTurn(async () => {
          const file = await readLogFile(req)
          const known = { request, name: file.name, size: file.bytes.length }
          return outsideSeries.create(viewer, id, file, request, onceOf(deps, { viewer, req, body: known }))
        }),
    ),
    route(
      {
        method: 'get',
        path: `${one}/rows`,
        action: 'pumping-tests/read',
        summary: 'Lines of such a series and what became of each',
        params,
        query: outsideRowQuery,
        response: outsideRows,
      },
      ({ viewer, params: { id }, query }) => outsideSeries.rows(viewer, id, query),
    ),
    route(
      {
        method: 'get',
        path: `${one}/values`,
        action: 'pumping-tests/read',
        summary: 'Times and values of such a series, for drawing',
        params,
        response: outsideValues,
      },
      ({ viewer, params: { id } }) => outsideSeries.values(viewer, id),
    ),
    route(
      {
        method: 'get',
        path: `${one}/file`,
        action: 'pumping-tests/read',
        summary: 'Such a series as it came',
        params,
        response: 'sent',
      },
      async ({ viewer, params: { id }, res }) => {
        const { name, bytes } = await outsideSeries.file(viewer, id)
        res.attachment(name).type('application/octet-stream').send(Buffer.from(bytes))
      },
    ),
    route(
      {
        method: 'delete',
        path: one,
        action: 'pumping-tests/edit',
        summary: 'Delete such a series',
        params,
        query: outsideDeletion,
        response: nothing,
      },
      ({ viewer, params: { id }, query: { rowVersion } }) => outsideSeries.remove(viewer, id, rowVersion),
    ),
  ]
}
