import { pino, type Logger } from 'pino'

/** One JSON line an event on standard output; secrets in headers are never written. */
export const createLog = (level: string): Logger =>
  pino({ level, redact: ['req.headers.cookie', 'req.headers.authorization', 'req.headers["x-csrf-token"]', 'res.headers["set-cookie"]'] })
