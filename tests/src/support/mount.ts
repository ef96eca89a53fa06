import { PiniaColada } from '@pinia/colada'
import { flushPromises, mount } from '@vue/test-utils'
import { createPinia, setActivePinia } from 'pinia'
import { vi } from 'vitest'
import { createApp, effectScope, h, type Component } from 'vue'
import { createMemoryHistory, createRouter } from 'vue-router'
import { VApp } from 'vuetify/components'
import type { Session } from '#shared/contracts/session.ts'
import { createVuetifyPlugin } from '../../../src/plugins/vuetify.ts'
import { routes } from '../../../src/router/routes.ts'
import { useSession } from '../../../src/stores/session.ts'
import { makeSession } from './session.ts'

interface MountOptions {
  props?: Record<string, unknown>
  slots?: Record<string, string | (() => unknown)>
  session?: Session
  path?: string
}

const unmounts: (() => void)[] = []

/** Leaves the page as it was; the setup file has it called after each test. */
export function cleanUp() {
  for (const unmount of unmounts.splice(0)) unmount()
  document.body.replaceChildren()
  localStorage.clear()
  vi.unstubAllGlobals()
}

/** happy-dom has no layout: what Vuetify measures with is answered with nothing. */
function standIns() {
  vi.stubGlobal(
    'ResizeObserver',
    class {
      observe() {}
      unobserve() {}
      disconnect() {}
    },
  )
  vi.stubGlobal('visualViewport', new EventTarget())
}

function plugins(session: Session) {
  const pinia = createPinia()
  setActivePinia(pinia)
  const router = createRouter({ history: createMemoryHistory(), routes })
  return { pinia, router, list: [pinia, PiniaColada, createVuetifyPlugin('light'), router], session }
}

function applicationOf(list: readonly unknown[]) {
  const app = createApp({ render: () => null })
  for (const plugin of list) app.use(plugin as never)
  return app
}

function enter(session: Session) {
  const store = useSession()
  store.enter(session)
}

/** A component inside the application's plugins, for somebody who is signed in (an analyst unless told otherwise). */
export async function mountWith(given: object, { props = {}, slots = {}, session, path = '/' }: MountOptions = {}) {
  standIns()
  // A generic component is a function to the type checker.
  const component = given as Component
  const { list, router } = plugins(session ?? makeSession())
  const host = document.createElement('div')
  document.body.append(host)
  const root = { render: () => h(VApp, null, { default: () => h(component, props, slots as never) }) }
  // As in the program: who is signed in is known before a page is set up, and stores are made inside an application.
  applicationOf(list.slice(0, 2)).runWithContext(() => enter(session ?? makeSession()))
  const wrapper = mount(root, { attachTo: host, global: { plugins: list as never } })
  unmounts.push(() => wrapper.unmount())
  await router.push(path)
  await flushPromises()
  return wrapper.findComponent(component)
}

/** Runs a composable or a store inside the application's plugins. */
export function runWith<Result>(use: () => Result, session: Session = makeSession()): Result {
  const { list } = plugins(session)
  const app = applicationOf(list)
  app.runWithContext(() => enter(session))
  const scope = effectScope()
  unmounts.push(() => scope.stop())
  return app.runWithContext(() => scope.run(use)) as Result
}

export const settle = flushPromises
