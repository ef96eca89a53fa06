import type { Role } from '#shared/contracts/permissions.ts'

export const roleWords: Record<Role, string> = {
  reader: 'Reader',
  analyst: 'Analyst',
  steward: 'Steward',
  administrator: 'Administrator',
}

/** What a role adds, for the page on which it is given. */
export const roleMeanings: Record<Role, string> = {
  reader: 'Sees published data, estimates and own places.',
  analyst: 'Also sees internal data, creates wells and tests, analyses them and submits values.',
  steward: 'Also edits any record, imports, and decides what is published.',
  administrator: 'Also manages people, settings and backups.',
}
