import { peopleQuery, type PeopleQuery } from '#shared/contracts/people.ts'
import { useAddressQuestion } from '../../composables/useAddressQuestion.ts'

export type PeopleAsked = Pick<PeopleQuery, 'search' | 'role' | 'state'>

const names = { text: 'search', role: 'role', state: 'state' } as const

/** What the list of people is asked. */
export const usePeopleQuestion = () => useAddressQuestion<PeopleAsked>({ names, fields: peopleQuery.shape })
