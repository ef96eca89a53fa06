import { mkdir, readFile, rm } from 'node:fs/promises'
import { join } from 'node:path'
import type { Request, RequestHandler } from 'express'
import multer, { MulterError } from 'multer'
import type { Config } from '../../config/config.ts'
import { AppError, fieldError } from '../../errors.ts'
import type { LogFile } from './reading-series.service.ts'

/** A logger file of 300,000 rows has about 15 MB. */
const mostBytes = 40 * 1024 * 1024

/** Where files lie while their requests are answered; what a crash left there the clean-up job removes. */
export const uploadFolder = ({ dataDir }: Pick<Config, 'dataDir'>) => join(dataDir, 'uploads')

/** A full disk is not the sender's doing. */
const isOfTheSystem = (error: unknown) => error instanceof Error && 'syscall' in error

/**
 * Takes the one file of a form to the disk, where files that arrive slowly cost no memory; refuses a larger one while it
 * is still arriving. The file is removed when the answer is sent or the sender has gone.
 */
export function takeLogFile(folder: string): RequestHandler {
  const upload = multer({
    storage: multer.diskStorage({
      destination: (_req, _file, done) =>
        void mkdir(folder, { recursive: true }).then(
          () => done(null, folder),
          (error: Error) => done(error, folder),
        ),
    }),
    limits: { fileSize: mostBytes, files: 1, fields: 5, fieldSize: 20_000 },
    defParamCharset: 'utf8',
  }).single('file')

  return (req, res, next) => {
    upload(req, res, (error: unknown) => {
      const { path } = req.file ?? {}
      const remove = () => path && void rm(path, { force: true })
      if (res.closed) remove()
      else res.once('close', remove)
      if (error instanceof MulterError && error.code === 'LIMIT_FILE_SIZE')
        return next(new AppError('request/too-large', { limit: '40 MB' }))
      if (isOfTheSystem(error)) return next(error)
      // Everything else that can go wrong here is the form: cut off, without a boundary, a part too many.
      next(error ? new AppError('request/malformed') : undefined)
    })
  }
}

/** The uploaded file in memory. @throws AppError when there is none, or its sender has gone and the file with them */
export async function readLogFile({ file, res }: Request): Promise<LogFile> {
  if (!file) throw fieldError('file', 'field/required')
  if (res?.closed) throw new AppError('request/malformed')
  return { name: file.originalname, bytes: await readFile(file.path) }
}
