import { z } from 'zod'
import {
  analysis,
  analysisInput,
  analysisList,
  analysisUpdate,
  anyWorkbenchInputs,
  submissionInput,
  takingBack,
  wellLossList,
} from '#shared/contracts/analyses.ts'
import { idInPath, nothing } from '#shared/contracts/common.ts'
import type { Deps } from '../../deps.ts'
import { onceOf } from '../idempotency/once.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

const params = z.object({ id: idInPath })
const ofTest = '/api/pumping-tests/:id/analyses'
const one = '/api/analyses/:id'

export function analysesRoutes({ analyses }: Services, deps: Deps): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/pumping-tests/:id/inputs',
        action: 'analyses/read',
        summary: 'What analyses of a test are calculated from, with its hash',
        params,
        response: anyWorkbenchInputs,
      },
      ({ viewer, params: { id } }) => analyses.workbench(viewer, id),
    ),
    route(
      {
        method: 'get',
        path: ofTest,
        action: 'analyses/read',
        summary: 'Analyses of a test',
        params,
        response: analysisList,
      },
      ({ viewer, params: { id } }) => analyses.list(viewer, id),
    ),
    route(
      {
        method: 'post',
        path: ofTest,
        action: 'analyses/create',
        summary: 'Save an analysis; the server calculates it again',
        params,
        body: analysisInput,
        response: analysis,
        status: 201,
        limit: 'heavy',
      },
      (call) => analyses.create(call.viewer, call.params.id, call.body, onceOf(deps, call)),
    ),
    route(
      {
        method: 'get',
        path: '/api/wells/:id/losses',
        action: 'analyses/read',
        summary: 'Losses of a well by its accepted step-drawdown tests',
        params,
        response: wellLossList,
      },
      ({ viewer, params: { id } }) => analyses.wellLosses(viewer, id),
    ),
    route(
      { method: 'get', path: one, action: 'analyses/read', summary: 'An analysis', params, response: analysis },
      ({ viewer, params: { id } }) => analyses.get(viewer, id),
    ),
    route(
      {
        method: 'put',
        path: one,
        action: 'analyses/create',
        summary: 'Change a draft; the server calculates it again',
        params,
        body: analysisUpdate,
        response: analysis,
        limit: 'heavy',
      },
      ({ viewer, params: { id }, body }) => analyses.update(viewer, id, body),
    ),
    route(
      {
        method: 'delete',
        path: one,
        action: 'analyses/create',
        summary: 'Delete a draft, or a reported value that waits for review',
        params,
        response: nothing,
      },
      ({ viewer, params: { id } }) => analyses.remove(viewer, id),
    ),
    route(
      {
        method: 'post',
        path: `${one}/submission`,
        action: 'analyses/submit',
        summary: 'Submit an analysis for review',
        params,
        body: submissionInput,
        response: analysis,
      },
      ({ viewer, params: { id }, body }) => analyses.submit(viewer, id, body),
    ),
    route(
      {
        method: 'delete',
        path: `${one}/submission`,
        action: 'analyses/submit',
        summary: 'Take a submitted analysis back: it is a draft again',
        params,
        query: takingBack,
        response: analysis,
      },
      ({ viewer, params: { id }, query: { rowVersion } }) => analyses.takeBack(viewer, id, rowVersion),
    ),
  ]
}
