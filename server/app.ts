import { randomUUID } from 'node:crypto'
import compression from 'compression'
import express, { type Express } from 'express'
import { pinoHttp } from 'pino-http'
import { apiRouter } from './api/index.ts'
import type { Deps } from './deps.ts'
import { clientFiles } from './middleware/client-files.ts'
import { sendProblem, unknownAddress } from './middleware/problem.ts'
import { securityHeaders } from './middleware/security-headers.ts'
import { tilesRouter } from './tiles/tiles.routes.ts'

/** The whole HTTP application, apart from listening. */
export function createApp(deps: Deps): Express {
  const app = express()
  app.disable('x-powered-by')
  app.set('trust proxy', deps.config.trustProxy)
  app.set('query parser', 'simple')
  app.use(pinoHttp({ logger: deps.log, genReqId: () => randomUUID(), autoLogging: false }))
  app.use(securityHeaders(deps.config))
  app.use(compression({ threshold: 1024 }))
  app.use('/tiles', tilesRouter(deps))
  app.use(apiRouter(deps))
  app.use(clientFiles(deps.config.clientDir))
  app.use(unknownAddress)
  app.use(sendProblem)
  return app
}
