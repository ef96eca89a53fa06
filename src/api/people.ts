import { peopleList, person, type Invitation, type PeopleQuery, type PersonEdit } from '#shared/contracts/people.ts'
import { api } from './client.ts'

export const fetchPeople = (query: PeopleQuery, signal?: AbortSignal) =>
  api.get('/api/people', { query, response: peopleList, signal })

export const invitePerson = (body: Invitation, idempotencyKey: string) =>
  api.post('/api/people', { body, response: person, idempotencyKey })

export const editPerson = (id: number, body: PersonEdit) => api.patch(`/api/people/${id}`, { body, response: person })

export const fetchPerson = (id: number) => api.get(`/api/people/${id}`, { response: person })

/** Sends the invitation once more, with a new link; the old one ends. */
export const inviteAgain = (id: number) => api.post(`/api/people/${id}/invitation`, { response: person })
