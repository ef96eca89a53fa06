import { readFile, stat } from 'node:fs/promises'
import { join } from 'node:path'
import express, { Router, type Request, type RequestHandler, type Response } from 'express'
import { cspNonce } from './security-headers.ts'

const notBuilt = `<!doctype html>
<html lang="en">
<head><meta charset="utf-8"><title>Basinbook</title></head>
<body>
<h1>The pages are not built yet</h1>
<p>The server runs, but the browser application is missing from its folder.
Run <code>npm start</code>, which builds it, or <code>npm run build</code>, and load this page again.</p>
</body>
</html>
`

/** Addresses that belong to the server: a wrong one is an error, not a page. */
const servedHere = /^\/(api|tiles|ogc|assets|healthz|readyz)(\/|$)/

/** Browsers name HTML when a person goes to an address, and only then; pictures and scripts ask for "anything". */
function isNavigation(req: Request): boolean {
  const asked = req.method === 'GET' || req.method === 'HEAD'
  const wantsPage = req.path === '/' || (req.get('accept') ?? '').includes('text/html')
  return asked && wantsPage && !servedHere.test(req.path)
}

/** Reads the page once per build. */
function pageReader(file: string): () => Promise<string | null> {
  let kept: { mtimeMs: number; html: string } | null = null
  return async () => {
    const found = await stat(file).catch(() => null)
    if (!found) return null
    if (kept?.mtimeMs !== found.mtimeMs) kept = { mtimeMs: found.mtimeMs, html: await readFile(file, 'utf8') }
    return kept.html
  }
}

/** The browser application reads its nonce here, for the style elements that it makes itself. */
const withNonce = (html: string, nonce: string) =>
  html.replace(/<head>/i, (head) => `${head}\n    <meta property="csp-nonce" nonce="${nonce}" />`)

function page(folder: string): RequestHandler {
  const read = pageReader(join(folder, 'index.html'))
  return async (req: Request, res: Response, next) => {
    if (!isNavigation(req)) return next()
    const html = await read()
    res.set('Cache-Control', 'no-cache')
    if (html === null) return void res.status(503).type('html').send(notBuilt)
    res.type('html').send(withNonce(html, cspNonce(res)))
  }
}

/** The built client: files under a content hash for ever, the rest asked for again, every page address the same page. */
export function clientFiles(folder: string): Router {
  const router = Router()
  const common = { index: false, redirect: false, fallthrough: true }
  router.use('/assets', express.static(join(folder, 'assets'), { ...common, immutable: true, maxAge: '365d' }))
  const files = express.static(folder, { ...common, maxAge: 0 })
  // The page itself never goes out as it lies there: it would lack its nonce.
  router.use((req, res, next) => (req.path === '/index.html' ? next() : files(req, res, next)))
  router.use(page(folder))
  return router
}
