import { describe, expect, it } from 'vitest'
import type { AuditEntry } from '#shared/contracts/audit-trail.ts'
import AuditTable from '../../../../src/components/accounts/AuditTable.vue'
import { mountWith } from '../../support/mount.ts'

const makeEntry = (overrides: Partial<AuditEntry> = {}): AuditEntry => ({
  id: 1,
  at: '2026-03-01T02:00:00.000Z',
  actorId: 4,
  actorName: 'Keeper',
  action: 'wells/edit',
  subject: 'well',
  subjectId: 12,
  details: {},
  ...overrides,
})
const cellsOf = async (entry: Partial<AuditEntry>) =>
  (await mountWith(AuditTable, { props: { entries: [makeEntry(entry)] } })).findAll('td').map((cell) => cell.text())

describe('the audit trail', () => {
  it('says what was done in words, with its code among the details', async () => {
    const cells = await cellsOf({ details: { code: 'V-0012' } })
    expect(cells.slice(1, 4)).toEqual(['Keeper', 'Changed a well', 'well 12'])
    expect(cells[4]).toMatch(/wells\/edit/)
    expect(cells[4]).toMatch(/V-0012/)
  })

  it('shows the code of an action that it has no words for', async () => {
    expect((await cellsOf({ action: 'wells-of-old/lift' }))[2]).toBe('wells-of-old/lift')
  })
})
