import { z } from 'zod'
import { unitSystems } from '#shared/quantities/systems.ts'
import { newPassword, password } from './password.ts'

export const unitSystemId = z.enum(unitSystems.map(({ id }) => id))

/** What a person chose for themselves. A new version of the shape gets a new literal and an upgrade from this one. */
export const preferences = z.strictObject({
  version: z.literal(1),
  /** Null: as the region has it. */
  unitSystem: unitSystemId.nullable(),
  theme: z.enum(['light', 'dark', 'system']),
  drawdownDirection: z.enum(['down', 'up']),
})
export type Preferences = z.infer<typeof preferences>

export const defaultPreferences: Preferences = {
  version: 1,
  unitSystem: null,
  theme: 'system',
  drawdownDirection: 'down',
}

/** Reads kept preferences of any version; what can no longer be understood becomes the default. */
export function readPreferences(stored: unknown): Preferences {
  const parsed = preferences.safeParse(stored)
  return parsed.success ? parsed.data : defaultPreferences
}

export const passwordChange = z.strictObject({ currentPassword: password, newPassword })
export type PasswordChange = z.infer<typeof passwordChange>
