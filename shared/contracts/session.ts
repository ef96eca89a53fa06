import { z } from 'zod'
import { preferences } from './account.ts'
import { basemap } from './basemap.ts'
import { emailAddress, password } from './password.ts'
import { role } from './permissions.ts'
import { region } from './region.ts'

export const signIn = z.strictObject({ email: emailAddress, password })
export type SignIn = z.infer<typeof signIn>

/** The page's first question: who am I, what may I send, where am I. Permissions follow from `can(viewer, action, region)`. */
export const session = z.object({
  viewer: z.object({
    /** Null for a visitor who is not signed in; then role and e-mail are null too. */
    id: z.int().positive().nullable(),
    name: z.string(),
    email: z.string().nullable(),
    role: role.nullable(),
    mayReview: z.boolean(),
  }),
  /** Goes into `X-CSRF-Token` of every request that is not a GET. Null for a visitor: there is nothing to protect. */
  csrfToken: z.string().nullable(),
  region,
  preferences,
  /** The one to show first in front. */
  basemaps: z.array(basemap),
})
export type Session = z.infer<typeof session>
