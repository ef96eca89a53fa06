import { computed } from 'vue'
import { z } from 'zod'
import { auditQuery, type AuditQuery } from '#shared/contracts/audit-trail.ts'
import { useAddressQuestion } from '../../composables/useAddressQuestion.ts'

/** Days as people name them, the last one included. */
export interface AuditAsked extends Pick<AuditQuery, 'actor' | 'action'> {
  fromDay?: string
  toDay?: string
}

const names = { person: 'actor', action: 'action', from: 'fromDay', to: 'toDay' } as const
const { actor, action } = auditQuery.shape
const fields = { actor, action, fromDay: z.iso.date().optional(), toDay: z.iso.date().optional() }

/** Midnight of a day in the reader's zone, as an instant; `days` later. */
const midnight = (day: string, days = 0) => {
  const at = new Date(`${day}T00:00`)
  at.setDate(at.getDate() + days)
  return at.toISOString()
}

/** What the audit trail is asked; the server is asked for instants. */
export function useAuditQuestion() {
  const question = useAddressQuestion<AuditAsked>({ names, fields })
  const query = computed(() => {
    const { fromDay, toDay, ...rest } = question.asked.value
    return {
      ...rest,
      ...(fromDay ? { from: midnight(fromDay) } : {}),
      ...(toDay ? { to: midnight(toDay, 1) } : {}),
    }
  })
  return { ...question, query }
}
