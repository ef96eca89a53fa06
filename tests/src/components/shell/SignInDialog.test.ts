import { describe, expect, it } from 'vitest'
import { z } from 'zod'
import SignInDialog from '../../../../src/components/shell/SignInDialog.vue'
import { api } from '../../../../src/api/client.ts'
import { connectApi } from '../../../../src/plugins/connect-api.ts'
import { getActivePinia } from 'pinia'
import { fakeServer, refuse } from '../../support/fake-server.ts'
import { mountWith, settle } from '../../support/mount.ts'
import { makeSession } from '../../support/session.ts'

const note = z.object({ text: z.string() })

/** A server whose session has ended until somebody signs in with the password "right". */
async function makePage() {
  let open = false
  fakeServer({
    'POST /api/session': ({ body }) => {
      open = (body as { password: string }).password === 'right'
      return open ? { body: makeSession() } : refuse('session/wrong')
    },
    'PUT /api/notes/1': ({ body }) => (open ? { body } : refuse('session/required')),
  })
  await mountWith(SignInDialog)
  connectApi(getActivePinia()!)
}

const dialog = () => document.querySelector<HTMLElement>('.v-overlay--active')
const button = (text: string) =>
  [...document.querySelectorAll('button')].find((found) => found.textContent?.includes(text))!

async function signIn(password: string) {
  const input = dialog()!.querySelector<HTMLInputElement>('input[type="password"]')!
  input.value = password
  input.dispatchEvent(new Event('input'))
  dialog()!
    .querySelector('form')!
    .dispatchEvent(new Event('submit', { cancelable: true }))
  await settle()
}

describe('an edit in an expired session', () => {
  it('is saved once the same person has signed in again, also after a wrong password', async () => {
    await makePage()
    const saving = api.put('/api/notes/1', { body: { text: 'kept' }, response: note })
    await settle()
    expect(dialog()?.textContent).toContain('What you entered is kept on this page')
    await signIn('wrong')
    expect(dialog()?.textContent).toContain('The e-mail address or the password is not right.')
    await signIn('right')
    expect(await saving).toEqual({ text: 'kept' })
  })

  it('is a problem on the page, not a loss, when the reader does not sign in now', async () => {
    await makePage()
    const saving = api.put('/api/notes/1', { body: { text: 'kept' }, response: note })
    await settle()
    button('Not now').click()
    await expect(saving).rejects.toThrow('Sign in to go on. What you entered is kept.')
  })
})
