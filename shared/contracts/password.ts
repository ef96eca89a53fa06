import { z } from 'zod'

/** Addresses are kept and compared in lower case. */
export const emailAddress = z.string().trim().toLowerCase().pipe(z.email().max(254))
/** A password as typed to sign in; only its length is limited, so that hashing it stays cheap. */
export const password = z.string().min(1).max(200)
export const newPassword = z.string().min(12).max(200)
export const personName = z.string().trim().min(1).max(120)

export const forgottenPassword = z.strictObject({ email: emailAddress })
export type ForgottenPassword = z.infer<typeof forgottenPassword>

/** Links carry the token after `#`, which browsers send to no server: it reaches no log. */
const token = z.string().min(20).max(100)
export const linkPurpose = z.enum(['invitation', 'reset', 'first-administrator'])
export type LinkPurpose = z.infer<typeof linkPurpose>

export const linkQuestion = z.strictObject({ token })

/** Whom a link is for. The first administrator gives address and name with the password. */
export const linkAnswer = z.object({
  purpose: linkPurpose,
  email: z.string().nullable(),
  name: z.string().nullable(),
})
export type LinkAnswer = z.infer<typeof linkAnswer>

/** `email` and `name` are for the first administrator; an invited person may correct the name. */
export const passwordSetting = z.strictObject({
  token,
  password: newPassword,
  email: emailAddress.optional(),
  name: personName.optional(),
})
export type PasswordSetting = z.infer<typeof passwordSetting>

/** The address to sign in with from now on. */
export const passwordWasSet = z.object({ email: z.string() })
