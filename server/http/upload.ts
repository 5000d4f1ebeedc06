import type { RequestHandler } from 'express'
import multer, { MulterError } from 'multer'
import { AppError } from '#shared/errors/AppError.ts'

/** Takes one file in memory, in the field `file`, with a few small text fields; nothing is written to disk. */
export function receiveFile(mostBytes: number): RequestHandler {
  const receive = multer({
    storage: multer.memoryStorage(),
    // Names of files are read as UTF-8 and then never kept: people write names there.
    defParamCharset: 'utf8',
    limits: { fileSize: mostBytes, files: 1, fields: 10, fieldSize: 10_000, parts: 12 },
  } as multer.Options).single('file')
  return (request, response, next) => {
    receive(request, response, (error: unknown) => {
      if (!(error instanceof MulterError)) {
        // busboy throws plain errors for a body that is not what it says.
        next(
          error
            ? new AppError('invalid', { fields: { file: 'The upload was cut off or malformed.' } })
            : undefined,
        )
        return
      }
      const megabytes = Math.floor(mostBytes / 1_000_000)
      next(
        error.code === 'LIMIT_FILE_SIZE'
          ? new AppError('too-large', { fields: { file: `At most ${megabytes} MB.` } })
          : new AppError('invalid', { fields: { file: 'Send one file.' } }),
      )
    })
  }
}
