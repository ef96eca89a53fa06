import { randomBytes } from 'node:crypto'
import type { RequestHandler, Response } from 'express'
import helmet from 'helmet'
import type { Config } from '../config/config.ts'

/** The nonce that style elements of this answer must carry. */
export const cspNonce = (res: Response): string => res.locals.cspNonce as string

/** Says to the browser what a page may load, and over what; every answer carries a nonce of its own. */
export function securityHeaders({ publicUrl }: Pick<Config, 'publicUrl'>): RequestHandler {
  const https = publicUrl.startsWith('https:')
  const headers = helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        styleSrc: ["'self'", (_req, res) => `'nonce-${cspNonce(res as Response)}'`],
        imgSrc: ["'self'", 'data:', 'blob:'],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
      },
    },
    // Browsers complain about these on plain http, and would remember HSTS for a host that has no certificate.
    strictTransportSecurity: https ? { maxAge: 31_536_000, includeSubDomains: false } : false,
    crossOriginOpenerPolicy: https,
    originAgentCluster: https,
    xFrameOptions: { action: 'deny' },
    referrerPolicy: { policy: 'same-origin' },
  })
  return (req, res, next) => {
    res.locals.cspNonce = randomBytes(16).toString('base64')
    headers(req, res, next)
  }
}
