import { describe, expect, it } from 'vitest'
import { actions, atLeast, can, visitor, type Action, type Role, type Viewer } from '#shared/contracts/permissions.ts'

const makeViewer = (role: Role | null, overrides: Partial<Viewer> = {}): Viewer =>
  role === null ? visitor : { id: 7, name: 'Somebody', role, mayReview: false, ...overrides }

const roles = [null, 'reader', 'analyst', 'steward', 'administrator'] as const

/** Written out from the description of the roles, one letter each: visitor, reader, analyst, steward, administrator. */
const expected: [Action, string][] = [
  ['session/sign-in', 'vrasA'],
  ['settings/read', 'vrasA'],
  ['account/edit', 'rasA'],
  ['wells/read', 'rasA'],
  ['estimates/read', 'rasA'],
  ['wells/create', 'asA'],
  ['analyses/submit', 'asA'],
  ['adopted-values/withdraw', 'sA'],
  ['visibility/edit', 'sA'],
  ['people/manage', 'A'],
  ['region/edit', 'A'],
  ['audit/read', 'A'],
  ['outbox/read', 'A'],
]

describe('permissions', () => {
  it.each(expected)('%s is for %s', (action, letters) => {
    const allowed = roles.map((role, index) => (can(makeViewer(role), action) ? 'vrasA'[index] : '')).join('')
    expect(allowed).toBe(letters)
  })

  it('open to visitors what a reader may see, and nothing that writes, when the region is open', () => {
    const opened = (Object.keys(actions) as Action[]).filter(
      (action) => can(visitor, action, { openToVisitors: true }) && !can(visitor, action),
    )
    expect(opened.length).toBeGreaterThan(5)
    expect(opened.every((action) => /\/(read|export)$/.test(action))).toBe(true)
  })

  it('give the review right to whoever holds it and is at least analyst', () => {
    const decides = (role: Role | null, mayReview: boolean) => can(makeViewer(role, { mayReview }), 'reviews/decide')
    expect(roles.map((role) => decides(role, true))).toEqual([false, false, true, true, true])
    expect(roles.map((role) => decides(role, false))).toEqual([false, false, false, false, false])
  })

  it('grow with the role', () => {
    for (const action of Object.keys(actions) as Action[]) {
      const allowed = roles.map((role) => Number(can(makeViewer(role, { mayReview: true }), action)))
      expect(allowed).toEqual([...allowed].sort())
    }
    expect(atLeast(makeViewer('steward'), 'analyst')).toBe(true)
    expect(atLeast(makeViewer('analyst'), 'steward')).toBe(false)
    expect(atLeast(visitor, 'reader')).toBe(false)
  })
})
