import type { AuditAction } from '#shared/contracts/audit-trail.ts'
import type { Invitation, PeopleQuery, Person, PersonEdit } from '#shared/contracts/people.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { invitationMail } from '#shared/words/mails.ts'
import type { Executor } from '../../db/client.ts'
import { isDuplicate } from '../../db/retry.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, fieldError, notFound } from '../../errors.ts'
import { queueMail } from '../../mail/queue-mail.ts'
import { endSessionsOf } from '../../middleware/session.repository.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { pageOf } from '../page-of.ts'
import { makeOnlyLink } from '../password/links.ts'
import type { RegionService } from '../region/region.service.ts'
import { changesOf, checkRights, endsSessions, personOf, stopsAdministering } from './people.rules.ts'
import * as repository from './people.repository.ts'

export function createPeopleService(deps: Deps, region: RegionService) {
  const { connection, now } = deps
  const { db } = connection

  async function rowOf(executor: Executor, id: number) {
    const row = await repository.findPerson(executor, id)
    if (!row) throw notFound()
    return row
  }

  async function insert(tx: Executor, invitation: Invitation): Promise<number> {
    try {
      return await repository.insertPerson(tx, { ...invitation, createdAt: now() })
    } catch (error) {
      throw isDuplicate(error) ? fieldError('email', 'people/address-taken') : error
    }
  }

  async function mailInvitation(
    tx: Executor,
    viewer: Viewer,
    id: number,
    { email, name }: { email: string; name: string },
  ) {
    const link = await makeOnlyLink(tx, deps, id, 'invitation')
    const words = invitationMail({ region: (await region.get(tx)).name, name, link, invitedBy: viewer.name })
    await queueMail(tx, deps, { to: email, ...words })
  }

  const record = (
    tx: Executor,
    viewer: Viewer,
    what: Extract<AuditAction, `people/${string}`>,
    id: number,
    details: Record<string, unknown>,
  ) => recordAudit(tx, { viewer, at: now(), action: what, subject: 'person', subjectId: id, details })

  return {
    async list(query: PeopleQuery) {
      const [rows, total] = await Promise.all([repository.listPeople(db, query), repository.countPeople(db, query)])
      return pageOf(rows.map(personOf), total, query)
    },

    get: async (id: number): Promise<Person> => personOf(await rowOf(db, id)),

    async invite(tx: Executor, viewer: Viewer, invitation: Invitation): Promise<Person> {
      checkRights(invitation)
      const id = await insert(tx, invitation)
      await mailInvitation(tx, viewer, id, invitation)
      await record(tx, viewer, 'people/invite', id, { ...invitation })
      return personOf(await rowOf(tx, id))
    },

    async inviteAgain(tx: Executor, viewer: Viewer, id: number): Promise<Person> {
      const row = await rowOf(tx, id)
      if (row.joined) throw new AppError('people/already-joined')
      if (!row.active) throw new AppError('people/deactivated')
      await mailInvitation(tx, viewer, id, row)
      await record(tx, viewer, 'people/invite-again', id, { email: row.email })
      return personOf(row)
    },

    async edit(viewer: Viewer, id: number, { rowVersion, ...wanted }: PersonEdit): Promise<Person> {
      return inTransaction(deps, async (tx) => {
        const before = await rowOf(tx, id)
        const after = { ...before, ...wanted }
        checkRights(after)
        if (stopsAdministering(before, after) && !(await repository.hasOtherAdministrator(tx, id)))
          throw new AppError('people/last-administrator')
        if (!(await repository.updatePerson(tx, id, rowVersion, wanted))) throw new AppError('edit/conflict')
        if (endsSessions(before, after)) await endSessionsOf(tx, id)
        await record(tx, viewer, 'people/edit', id, changesOf(before, after))
        return personOf(await rowOf(tx, id))
      })
    },
  }
}
