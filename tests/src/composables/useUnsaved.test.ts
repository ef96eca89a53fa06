import { describe, expect, it } from 'vitest'
import { defineComponent, h } from 'vue'
import { useRouter, type Router } from 'vue-router'
import LeaveDialog from '../../../src/components/shell/LeaveDialog.vue'
import { useUnsaved } from '../../../src/composables/useUnsaved.ts'
import { mountWith, settle } from '../support/mount.ts'

const button = (text: string) =>
  [...document.querySelectorAll('button')].find((found) => found.textContent?.trim() === text)!

/** A form at /account; `state.changed` says whether something was entered. */
async function makePage() {
  const state = { changed: false, letGo: () => {}, router: null as Router | null }
  const form = defineComponent({
    setup() {
      state.letGo = useUnsaved(() => state.changed)
      state.router = useRouter()
      return () => h(LeaveDialog)
    },
  })
  await mountWith(form, { path: '/forgotten-password' })
  const go = (path: string) => state.router!.push(path)
  return { state, go, at: () => state.router!.currentRoute.value.path }
}

describe('a page with entries that are not saved', () => {
  it('is left only when the reader says so', async () => {
    const { state, go, at } = await makePage()
    state.changed = true
    const first = go('/sign-in')
    await settle()
    button('Keep as it is').click()
    await first
    expect(at()).toBe('/forgotten-password')
    const second = go('/sign-in')
    await settle()
    button('Leave').click()
    await second
    expect(at()).toBe('/sign-in')
  })

  it('makes the browser ask before the window is closed', async () => {
    const { state } = await makePage()
    const closing = () => !window.dispatchEvent(new Event('beforeunload', { cancelable: true }))
    expect(closing()).toBe(false)
    state.changed = true
    expect(closing()).toBe(true)
  })

  it('is left without a question once it is saved, or when nothing was entered', async () => {
    const { state, go, at } = await makePage()
    await go('/sign-in')
    expect(at()).toBe('/sign-in')
    state.changed = true
    state.letGo()
    await go('/forgotten-password')
    expect(at()).toBe('/forgotten-password')
  })
})
