import { idParams } from '#shared/contracts/common.ts'
import { invitation, peopleList, peopleQuery, person, personEdit } from '#shared/contracts/people.ts'
import type { Deps } from '../../deps.ts'
import { once } from '../idempotency/once.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

const action = 'people/manage'
const path = '/api/people'
const one = { path: '/api/people/:id', action, params: idParams, response: person } as const

export function peopleRoutes({ people }: Services, deps: Deps): Route[] {
  return [
    route(
      { method: 'get', path, action, summary: 'Everybody with an account', query: peopleQuery, response: peopleList },
      ({ query }) => people.list(query),
    ),
    route({ ...one, method: 'get', summary: 'One person' }, ({ params }) => people.get(params.id)),
    route(
      {
        method: 'post',
        path,
        action,
        summary: 'Invite somebody by e-mail',
        body: invitation,
        response: person,
        status: 201,
      },
      (call) => once(deps, call, (tx) => people.invite(tx, call.viewer, call.body)),
    ),
    route(
      { ...one, method: 'patch', summary: 'Change the name, rights or activation of a person', body: personEdit },
      ({ viewer, params, body }) => people.edit(viewer, params.id, body),
    ),
    route(
      { ...one, method: 'post', path: '/api/people/:id/invitation', summary: 'Send the invitation again' },
      (call) => once(deps, call, (tx) => people.inviteAgain(tx, call.viewer, call.params.id)),
    ),
  ]
}
