import { describe, expect, it, vi } from 'vitest'
import RemoveReported from '../../../../src/components/analyses/RemoveReported.vue'
// Loaded before, so that no step waits for the page of a route.
import '../../../../src/views/ForgottenPasswordView.vue'
import '../../../../src/views/PumpingTestsView.vue'
import { fakeServer, refuse, type Rules } from '../../support/fake-server.ts'
import { mountWith } from '../../support/mount.ts'

const path = '/forgotten-password'

async function takeBack(rule: Rules[string], last = true) {
  const { asked } = fakeServer({ 'DELETE /api/analyses/7': rule })
  const page = await mountWith(RemoveReported, { props: { id: 7, last }, path })
  await page.find('button').trigger('click')
  const dialog = await vi.waitUntil(() => document.querySelector('[role="alertdialog"]'))
  const text = dialog.textContent
  dialog.querySelectorAll('button')[1]!.click()
  await vi.waitUntil(() => asked.length > 0)
  return { page, text, address: () => page.vm.$route.path }
}

describe('taking a reported value back', () => {
  it('leaves the page of a test that goes with its last value', async () => {
    const { text, address } = await takeBack(() => ({ body: {} }))
    expect(text).toContain('this test, of which nothing else is known')
    await vi.waitFor(() => expect(address()).toBe('/pumping-tests'))
  })

  it('stays where the test has other values', async () => {
    const { text, address, page } = await takeBack(() => ({ body: {} }), false)
    expect(text).toContain('The other values of this test stay')
    await vi.waitFor(() => expect(document.querySelector('[role="alertdialog"].v-overlay--active')).toBeNull())
    expect(address()).toBe(path)
    expect(page.find('[role="alert"]').exists()).toBe(false)
  })

  it('says why it cannot be done any more', async () => {
    const { page, address } = await takeBack(() => refuse('analysis/reported-decided'))
    await vi.waitFor(() => expect(page.text()).toContain('A reviewer has decided'))
    expect(address()).toBe(path)
  })
})
