import { defineStore } from 'pinia'
import { ref } from 'vue'

export interface Message {
  id: number
  text: string
  severity: 'done' | 'caution' | 'failed'
  /** At most one thing to do about it, such as undoing. */
  action?: { label: string; run: () => void }
}

/** Short notices at the foot of the page. Nothing stands here only: what must not be missed stands on the page itself. */
export const useMessages = defineStore('messages', () => {
  const messages = ref<Message[]>([])
  let lastId = 0

  function tell(text: string, severity: Message['severity'] = 'done', action?: Message['action']) {
    lastId += 1
    messages.value.push({ id: lastId, text, severity, ...(action ? { action } : {}) })
  }

  function dismiss(id: number) {
    messages.value = messages.value.filter((message) => message.id !== id)
  }

  return { messages, tell, dismiss }
})
