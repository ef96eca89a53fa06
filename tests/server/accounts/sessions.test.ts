import request from 'supertest'
import { describe, expect, it } from 'vitest'
import { testPassword, useApp } from '../../support/app.ts'

const test = useApp()

const cookieOf = (answer: request.Response) => String(answer.headers['set-cookie']?.[0] ?? '')
const idOf = (answer: request.Response) => /basinbook=([^;]+)/.exec(cookieOf(answer))?.[1]

describe('signing in', () => {
  it('answers with the person and a token, over a cookie that scripts cannot read', async () => {
    const { email } = await test.makePerson({ role: 'analyst', name: 'Field hydrogeologist', mayReview: true })
    const answer = await request(test.app).post('/api/session').send({ email, password: testPassword }).expect(200)
    expect(answer.body.viewer).toMatchObject({ name: 'Field hydrogeologist', email, role: 'analyst', mayReview: true })
    expect(answer.body.csrfToken).toMatch(/^[\w-]{43}$/)
    expect(cookieOf(answer)).toMatch(/^basinbook=.+; Path=\/; Expires=.+; HttpOnly; SameSite=Lax$/)
  })

  it('takes the address in any case and with blanks around it', async () => {
    const { email } = await test.makePerson()
    const typed = `  ${email.toUpperCase()} `
    await request(test.app).post('/api/session').send({ email: typed, password: testPassword }).expect(200)
  })
})
