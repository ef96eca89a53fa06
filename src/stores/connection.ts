import { useQueryCache } from '@pinia/colada'
import { defineStore } from 'pinia'
import { ref } from 'vue'
import { serverAnswers } from '../api/readiness.ts'

const RETRY_MS = 5_000

/** Whether the server answers. After a failure it asks again until it does, then refreshes what is on the page. */
export const useConnection = defineStore('connection', () => {
  const available = ref(true)
  const checking = ref(false)
  const queries = useQueryCache()
  let timer: ReturnType<typeof setTimeout> | undefined

  function lost() {
    if (!available.value) return
    available.value = false
    timer = setTimeout(retry, RETRY_MS)
  }

  async function retry() {
    clearTimeout(timer)
    checking.value = true
    available.value = await serverAnswers()
    checking.value = false
    // What still fails says so where it stands.
    if (available.value) await queries.invalidateQueries().catch(() => undefined)
    else timer = setTimeout(retry, RETRY_MS)
  }

  return { available, checking, lost, retry }
})
