import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import express from 'express'
import { pinoHttp } from 'pino-http'
import { pino } from 'pino'
import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { clientFiles } from '../../../server/middleware/client-files.ts'
import { sendProblem, unknownAddress } from '../../../server/middleware/problem.ts'
import { securityHeaders } from '../../../server/middleware/security-headers.ts'

const folder = mkdtempSync(join(tmpdir(), 'bb-dist-'))
const page = '<!doctype html><html><head>\n<title>Basinbook</title></head><body><div id="app"></div></body></html>'
beforeAll(() => {
  mkdirSync(join(folder, 'assets'))
  writeFileSync(join(folder, 'index.html'), page)
  writeFileSync(join(folder, 'icon.svg'), '<svg xmlns="http://www.w3.org/2000/svg"/>')
  writeFileSync(join(folder, 'assets/index-3f2a.js'), 'export {}')
})
afterAll(() => rmSync(folder, { recursive: true }))

function makeSite(from = folder) {
  const app = express()
  app.use(pinoHttp({ logger: pino({ level: 'silent' }) }))
  app.use(securityHeaders({ publicUrl: 'http://127.0.0.1:8080' }))
  app.use(clientFiles(from), unknownAddress, sendProblem)
  return request(app)
}

const browse = (path: string) => makeSite().get(path).set('Accept', 'text/html,application/xhtml+xml,*/*;q=0.8')
const nonceOf = (text: string) => /<meta property="csp-nonce" nonce="([^"]+)" \/>/.exec(text)?.[1]

describe('the page', () => {
  it.each(['/', '/map', '/wells/12', '/index.html', '/set-password'])('answers at %s', async (path) => {
    const answer = await browse(path).expect(200)
    expect(answer.text).toContain('<div id="app">')
    expect(answer.headers['cache-control']).toBe('no-cache')
    expect(answer.headers['content-type']).toBe('text/html; charset=utf-8')
  })

  it('carries the nonce of its own policy, another one each time', async () => {
    const answers = [await browse('/'), await browse('/')]
    const nonces = answers.map(({ text }) => nonceOf(text))
    answers.forEach(({ headers }, index) =>
      expect(headers['content-security-policy']).toContain(`style-src 'self' 'nonce-${nonces[index]}'`),
    )
    expect(nonces[0]).toMatch(/^[\w+/]{22}==$/)
    expect(nonces[0]).not.toBe(nonces[1])
  })

  it('follows a new build without a restart', async () => {
    const site = makeSite()
    await site.get('/')
    writeFileSync(join(folder, 'index.html'), page.replace('Basinbook', 'Built again'))
    expect((await site.get('/')).text).toContain('Built again')
    writeFileSync(join(folder, 'index.html'), page)
  })

  it('says plainly when it is not built', async () => {
    const answer = await makeSite(join(folder, 'nowhere')).get('/').expect(503)
    expect(answer.text).toContain('The pages are not built yet')
    expect(answer.text).toContain('npm start')
  })
})

describe('an address that is not a page', () => {
  it.each(['/api/none', '/tiles/none', '/ogc/none', '/assets/none.js'])('is an error at %s', async (path) => {
    const answer = await browse(path)
    expect(answer.body).toMatchObject({ status: 404, code: 'request/not-found' })
  })

  it('is an error for whatever is not a person going there', async () => {
    await makeSite().get('/missing.png').set('Accept', 'image/avif,image/webp,*/*').expect(404)
    await makeSite().get('/map').set('Accept', 'application/json').expect(404)
    await makeSite().post('/map').set('Accept', 'text/html').expect(404)
  })

  it('does not lead out of the folder', async () => {
    for (const path of ['/assets/..%2f..%2fetc/passwd', '/..%2f..%2fetc%2fpasswd', '/%2e%2e/package.json']) {
      const answer = await makeSite().get(path)
      expect(answer.status).toBeGreaterThanOrEqual(400)
    }
  })
})

describe('files', () => {
  it('under a content hash are kept for ever, others are asked for again', async () => {
    const hashed = await makeSite().get('/assets/index-3f2a.js').expect(200)
    expect(hashed.headers['cache-control']).toBe('public, max-age=31536000, immutable')
    const plain = await makeSite().get('/icon.svg').expect(200)
    expect(plain.headers['cache-control']).toBe('public, max-age=0')
  })
})

describe('the policy', () => {
  it('allows no foreign origin, no inline script or style, no eval, no frame', async () => {
    const { headers } = await browse('/')
    const policy = headers['content-security-policy']!
    expect(policy).not.toMatch(/unsafe|https?:|\*/)
    for (const part of [
      "default-src 'self'",
      "object-src 'none'",
      "frame-ancestors 'none'",
      "img-src 'self' data: blob:",
    ])
      expect(policy).toContain(part)
    expect(headers['x-content-type-options']).toBe('nosniff')
    expect(headers['x-powered-by']).toBeUndefined()
  })
})
