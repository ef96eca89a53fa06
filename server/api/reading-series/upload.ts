import type { RequestHandler } from 'express'
import multer, { MulterError } from 'multer'
import { AppError } from '../../errors.ts'

/** A logger file of 300,000 rows has about 15 MB. */
const mostBytes = 40 * 1024 * 1024

const upload = multer({
  storage: multer.memoryStorage(),
  limits: { fileSize: mostBytes, files: 1, fields: 5, fieldSize: 20_000 },
  defParamCharset: 'utf8',
}).single('file')

/** Takes the one file of a form into memory; refuses a larger one while it is still arriving. */
export const takeLogFile: RequestHandler = (req, res, next) => {
  upload(req, res, (error: unknown) => {
    if (error instanceof MulterError && error.code === 'LIMIT_FILE_SIZE')
      return next(new AppError('request/too-large', { limit: '40 MB' }))
    // Everything else that can go wrong here is the form: cut off, without a boundary, a part too many.
    next(error ? new AppError('request/malformed') : undefined)
  })
}
