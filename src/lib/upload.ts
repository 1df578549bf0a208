import type { z } from 'zod';
import { AppError } from '../../shared/errors.ts';
import { problem } from '../../shared/schemas/problem.ts';

export interface UploadOptions {
  field: string;
  file: File;
  /** Share of the file that has been sent, 0 to 1. */
  onProgress: (share: number) => void;
  signal?: AbortSignal;
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

/** Sends a file as a form and says how far it is, which fetch cannot; parses the answer with its schema. */
export function uploadFile<Schema extends z.ZodType>(
  schema: Schema,
  path: string,
  { field, file, onProgress, signal }: UploadOptions,
): Promise<z.infer<Schema>> {
  return new Promise((resolve, reject) => {
    const request = new XMLHttpRequest();
    const form = new FormData();
    form.append(field, file);
    request.open('POST', `/api${path}`);
    request.setRequestHeader('accept', 'application/json');
    request.upload.onprogress = (event) => {
      if (event.lengthComputable) onProgress(event.loaded / event.total);
    };
    request.onload = () => {
      const body = parseJson(request.responseText);
      const parsed = schema.safeParse(body);
      if (request.status < 300 && parsed.success) return resolve(parsed.data);
      const told = problem.safeParse(body);
      if (told.success) {
        const { code, detail, issues } = told.data;
        return reject(new AppError(code, detail, issues === undefined ? {} : { issues }));
      }
      reject(new AppError('internal', 'The server does not answer as it should. Try again in a moment.'));
    };
    request.onerror = () =>
      reject(new AppError('unavailable', 'The file could not be sent; the connection was lost. Try again.'));
    request.onabort = () =>
      reject(new AppError('invalid', 'The sending was stopped; nothing is kept of it.'));
    signal?.addEventListener('abort', () => request.abort());
    request.send(form);
  });
}
