import { z } from 'zod'
import {
  adoptedHistory,
  adoptedValue,
  adoptedValueExportQuery,
  adoptedValueList,
  adoptedValueQuery,
  withdrawalInput,
} from '#shared/contracts/adopted-values.ts'
import { idInPath, nothing } from '#shared/contracts/common.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

const params = z.object({ id: idInPath })

export function adoptedValuesRoutes({ adoptedValues }: Services): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/adopted-values',
        action: 'adopted-values/read',
        summary: 'The regional table: current adopted values with statistics of all that match',
        query: adoptedValueQuery,
        response: adoptedValueList,
      },
      ({ viewer, query }) => adoptedValues.list(viewer, query),
    ),
    route(
      {
        method: 'get',
        path: '/api/adopted-values.csv',
        action: 'adopted-values/export',
        summary: 'The regional table as CSV',
        query: adoptedValueExportQuery,
        response: 'sent',
        limit: 'heavy',
      },
      async ({ viewer, query: { unitSystem, ...filters }, res }) => {
        const csv = await adoptedValues.exportCsv(viewer, filters, unitSystem)
        res.attachment('regional-table.csv').type('text/csv').send(csv)
      },
    ),
    route(
      {
        method: 'get',
        path: '/api/adopted-values/:id',
        action: 'adopted-values/read',
        summary: 'An adopted value, also one that was replaced or withdrawn',
        params,
        response: adoptedValue,
      },
      ({ viewer, params: { id } }) => adoptedValues.get(viewer, id),
    ),
    route(
      {
        method: 'get',
        path: '/api/pumping-tests/:id/adopted-values',
        action: 'adopted-values/read',
        summary: 'Every value a test ever had, newest first',
        params,
        response: adoptedHistory,
      },
      ({ viewer, params: { id } }) => adoptedValues.history(viewer, id),
    ),
    route(
      {
        method: 'post',
        path: '/api/adopted-values/:id/withdrawal',
        action: 'adopted-values/withdraw',
        summary: 'Take a value out of the regional table',
        params,
        body: withdrawalInput,
        response: nothing,
      },
      ({ viewer, params: { id }, body: { reason } }) => adoptedValues.withdraw(viewer, id, reason),
    ),
  ]
}
