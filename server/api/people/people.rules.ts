import type { Person } from '#shared/contracts/people.ts'
import type { Role } from '#shared/contracts/permissions.ts'
import { fieldError } from '../../errors.ts'
import type { PersonRow } from './people.repository.ts'

type Rights = Pick<PersonRow, 'name' | 'role' | 'mayReview' | 'active'>

export function personOf({ active, joined, createdAt, lastSeenAt, ...row }: PersonRow): Person {
  const state = !active ? 'deactivated' : joined ? 'active' : 'invited'
  return { ...row, state, createdAt: createdAt.toISOString(), lastSeenAt: lastSeenAt?.toISOString() ?? null }
}

/** @throws AppError when the rights do not go together. */
export function checkRights({ role, mayReview }: { role: Role; mayReview: boolean }): void {
  if (role === 'reader' && mayReview) throw fieldError('mayReview', 'people/review-needs-analyst')
}

const administers = ({ role, active }: Rights) => role === 'administrator' && active

export const stopsAdministering = (before: Rights, after: Rights): boolean => administers(before) && !administers(after)

/** A person whose rights change signs in again, so that no page goes on showing what they may no longer do. */
export const endsSessions = (before: Rights, after: Rights): boolean =>
  before.role !== after.role || before.mayReview !== after.mayReview || before.active !== after.active

/** For the audit trail: each changed field with its value before and after. */
export function changesOf(before: Rights, after: Rights): Record<string, [unknown, unknown]> {
  const fields = ['name', 'role', 'mayReview', 'active'] as const
  const changed = fields.filter((field) => before[field] !== after[field])
  return Object.fromEntries(changed.map((field) => [field, [before[field], after[field]]]))
}
