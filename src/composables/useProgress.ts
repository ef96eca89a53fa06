import { computed, onScopeDispose, shallowRef, toValue, watch, type MaybeRefOrGetter } from 'vue'
import type { Job } from '#shared/contracts/jobs.ts'
import { followProgress } from '../api/progress.ts'

const ends: readonly Job['state'][] = ['done', 'failed', 'cancelled']

/** Follows one job while the calling component lives; null until there is news of it. */
export function useProgress(jobId: MaybeRefOrGetter<number | null>) {
  const job = shallowRef<Job | null>(null)
  const ended = computed(() => job.value !== null && ends.includes(job.value.state))
  const leave = shallowRef<(() => void) | null>(null)

  function follow(id: number | null) {
    leave.value?.()
    job.value = null
    leave.value = id === null ? null : followProgress((news) => news.id === id && (job.value = news))
  }

  watch(() => toValue(jobId), follow, { immediate: true })
  onScopeDispose(() => leave.value?.())
  return { job, ended }
}
