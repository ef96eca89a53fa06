import { and, asc, eq, gt, inArray, lte, or, sql } from 'drizzle-orm'
import type { Database, Executor } from '../db/client.ts'
import { jobs, leases } from '../db/schema/index.ts'
import { isDuplicate } from '../db/retry.ts'
import type { EnqueueOptions, JobProgress } from './jobs.ts'

export type JobRow = typeof jobs.$inferSelect

/** Adds a waiting job; null when one with the same key waits already. */
export async function insertJob(executor: Executor, kind: string, now: Date, options: EnqueueOptions) {
  const { payload = {}, uniqueKey = null, runAt = now, createdBy = null } = options
  try {
    const [row] = await executor
      .insert(jobs)
      .values({ kind, payload, uniqueKey, runAt, createdBy, state: 'waiting', createdAt: now })
      .$returningId()
    return row!.id
  } catch (error) {
    if (uniqueKey !== null && isDuplicate(error)) return null
    throw error
  }
}

/** Takes the oldest due job, or null. Rows that another process is taking are passed over, not waited for. */
export async function claimJob(db: Database, kinds: string[], holder: string, now: Date): Promise<JobRow | null> {
  if (kinds.length === 0) return null
  return db.transaction(async (tx) => {
    const [row] = await tx
      .select()
      .from(jobs)
      .where(and(eq(jobs.state, 'waiting'), lte(jobs.runAt, now), inArray(jobs.kind, kinds)))
      .orderBy(asc(jobs.runAt), asc(jobs.id))
      .limit(1)
      .for('update', { skipLocked: true })
    if (!row) return null
    const claim = {
      state: 'running' as const,
      claimedBy: holder,
      heartbeatAt: now,
      uniqueKey: null,
      attempts: row.attempts + 1,
    }
    await tx.update(jobs).set(claim).where(eq(jobs.id, row.id))
    return { ...row, ...claim }
  })
}

const held = (id: number, holder: string) => and(eq(jobs.id, id), eq(jobs.claimedBy, holder), eq(jobs.state, 'running'))

/** Says that the holder lives, and tells whether somebody asked to cancel; null when the job was taken over. */
export async function beat(db: Database, id: number, holder: string, now: Date): Promise<boolean | null> {
  await db.update(jobs).set({ heartbeatAt: now }).where(held(id, holder))
  const [row] = await db.select({ cancel: jobs.cancelRequested }).from(jobs).where(held(id, holder))
  return row ? row.cancel : null
}

export const saveProgress = (db: Database, id: number, holder: string, { done, total, message }: JobProgress) =>
  db
    .update(jobs)
    .set({ done, total, message: message.slice(0, 300) })
    .where(held(id, holder))

export interface Outcome {
  state: 'done' | 'failed' | 'cancelled' | 'waiting'
  result?: unknown
  errorCode?: string
  errorDetail?: string
  runAt?: Date
}

export async function finishJob(db: Database, id: number, holder: string, now: Date, outcome: Outcome) {
  const finishedAt = outcome.state === 'waiting' ? null : now
  await db
    .update(jobs)
    .set({ ...outcome, finishedAt, claimedBy: null, heartbeatAt: null })
    .where(held(id, holder))
}

/** Jobs whose holder went silent wait again, or have failed when they were tried often enough. */
export async function takeBackSilent(db: Database, silentSince: Date, now: Date) {
  const silent = and(eq(jobs.state, 'running'), lte(jobs.heartbeatAt, silentSince))
  await db
    .update(jobs)
    .set({ state: 'failed', errorCode: 'job/process-died', finishedAt: now, claimedBy: null })
    .where(and(silent, sql`${jobs.attempts} >= ${jobs.maxAttempts}`))
  await db.update(jobs).set({ state: 'waiting', claimedBy: null, heartbeatAt: null }).where(silent)
}

/** A waiting job ends at once; a running one is asked to. False when there was nothing to cancel. */
export async function cancelJob(executor: Executor, id: number, now: Date): Promise<boolean> {
  const [waiting] = await executor
    .update(jobs)
    .set({ state: 'cancelled', uniqueKey: null, finishedAt: now })
    .where(and(eq(jobs.id, id), eq(jobs.state, 'waiting')))
  if (waiting.affectedRows > 0) return true
  const [running] = await executor
    .update(jobs)
    .set({ cancelRequested: true })
    .where(and(eq(jobs.id, id), eq(jobs.state, 'running')))
  return running.affectedRows > 0
}

/** Newest first; `createdBy` null means everybody's. */
export function listJobs(executor: Executor, createdBy: number | null, limit: number, offset: number) {
  return executor
    .select()
    .from(jobs)
    .where(createdBy === null ? undefined : eq(jobs.createdBy, createdBy))
    .orderBy(sql`${jobs.id} desc`)
    .limit(limit)
    .offset(offset)
}

export async function countJobs(executor: Executor): Promise<number> {
  return executor.$count(jobs)
}

/** What a progress stream shows: running and waiting jobs, and those that ended since. */
export function activeJobs(executor: Executor, createdBy: number | null, endedSince: Date) {
  const active = or(inArray(jobs.state, ['waiting', 'running']), gt(jobs.finishedAt, endedSince))
  return executor
    .select()
    .from(jobs)
    .where(and(active, createdBy === null ? undefined : eq(jobs.createdBy, createdBy)))
    .orderBy(asc(jobs.id))
    .limit(100)
}

/** Takes a named lease when nobody holds it; true for exactly one of any number of processes. */
export async function takeLease(
  executor: Executor,
  name: string,
  holder: string,
  now: Date,
  expiresAt: Date,
): Promise<boolean> {
  await executor
    .insert(leases)
    .ignore()
    .values({ name, holder, expiresAt: new Date(0) })
  const [taken] = await executor
    .update(leases)
    .set({ holder, expiresAt })
    .where(and(eq(leases.name, name), lte(leases.expiresAt, now)))
  return taken.affectedRows === 1
}
