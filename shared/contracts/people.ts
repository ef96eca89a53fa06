import { z } from 'zod'
import { instant, listOf, paging, recordId, rowVersion } from './common.ts'
import { emailAddress, personName } from './password.ts'
import { role } from './permissions.ts'

export const personState = z.enum(['active', 'invited', 'deactivated'])

export const person = z.object({
  id: recordId,
  email: z.string(),
  name: z.string(),
  role,
  mayReview: z.boolean(),
  /** invited: has not set a password yet. */
  state: personState,
  demo: z.boolean(),
  createdAt: instant,
  lastSeenAt: instant.nullable(),
  rowVersion,
})
export type Person = z.infer<typeof person>

export const peopleQuery = paging.extend({
  /** Part of a name or address. */
  search: z.string().trim().max(120).optional(),
  role: role.optional(),
  state: personState.optional(),
})
export type PeopleQuery = z.infer<typeof peopleQuery>

export const peopleList = listOf(person)

export const invitation = z.strictObject({
  email: emailAddress,
  name: personName,
  role,
  mayReview: z.boolean().default(false),
})
export type Invitation = z.infer<typeof invitation>

export const personEdit = z.strictObject({
  rowVersion,
  name: personName.optional(),
  role: role.optional(),
  mayReview: z.boolean().optional(),
  active: z.boolean().optional(),
})
export type PersonEdit = z.infer<typeof personEdit>
