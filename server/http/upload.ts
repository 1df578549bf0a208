import { rm } from 'node:fs/promises';
import type { Request, RequestHandler } from 'express';
import multer, { MulterError } from 'multer';
import { AppError } from '../../shared/errors.ts';

export interface Upload {
  /** Where it has been written, under a name that its sender has no say in. */
  file: string;
  /** What its sender calls it. */
  name: string;
}

const mebibyte = 1024 * 1024;

/**
 * Takes a form with one file, streamed to disk; requests that are no forms pass. Whoever handles the request
 * removes the file. `folder` is asked at the first upload.
 */
export function receiveUpload(field: string, folder: () => string, maxBytes: number): RequestHandler {
  let receive: RequestHandler | undefined;
  return (request, response, next) => {
    if (!request.is('multipart/form-data')) return next();
    // The form around the file takes a little as well.
    if (Number(request.get('content-length') ?? 0) > maxBytes + mebibyte) throw tooLarge(maxBytes);
    receive ??= multer({
      dest: folder(),
      limits: { fileSize: maxBytes, files: 1, fields: 0, parts: 1, headerPairs: 20, fieldNameSize: 100 },
    }).single(field);
    receive(request, response, (error: unknown) =>
      next(error === undefined ? undefined : toAppError(error, maxBytes)),
    );
  };
}

export function uploadOf(request: Request): Upload | undefined {
  const { file } = request;
  // Names in forms are UTF-8, and are read as Latin-1.
  return file && { file: file.path, name: Buffer.from(file.originalname, 'latin1').toString('utf8') };
}

/** For requests that are refused after the file has come. */
export async function dropUpload(request: Request): Promise<void> {
  if (request.file) await rm(request.file.path, { force: true });
}

function tooLarge(maxBytes: number, cause?: unknown): AppError {
  return new AppError('too_large', `The archive is larger than ${maxBytes / mebibyte} MiB.`, { cause });
}

function toAppError(error: unknown, maxBytes: number): unknown {
  if (!(error instanceof MulterError)) {
    // The parser of forms throws plain errors for what is no form.
    return new AppError('invalid', 'This form cannot be read; it may have been cut short.', { cause: error });
  }
  if (error.code === 'LIMIT_FILE_SIZE') return tooLarge(maxBytes, error);
  return new AppError('invalid', 'A form with one file and nothing else was expected.', { cause: error });
}
